export const USUAL_PORT: number;
export const SHORTEST_PASSWORD: number;
export function checkNode(version?: string): void;
export interface StartSettings {
  port: number;
  portFixed: boolean;
  host: string | undefined;
  publicUrl: string | undefined;
  trustProxy: boolean;
  yard: boolean;
  rate: number;
  password: string | undefined;
  authSecret: string | undefined;
  databaseUrl: string | undefined;
  dataDir: string;
  webPort: number | undefined;
  workerPort: number | undefined;
  mailPort: number | undefined;
}
export function readSettings(
  env: Record<string, string | undefined>,
  usual?: { usualPort?: number },
): StartSettings;
