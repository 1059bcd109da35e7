export function keptSecrets(settings: {
  dataDir: string;
  authSecret?: string | undefined;
  password?: string | undefined;
  rate: number;
}): { authSecret: string; password: string; rate: number };
export function claimFolder(dataDir: string, port: number): void;
