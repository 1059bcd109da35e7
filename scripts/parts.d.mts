export const DOOR: string;
export function doorArguments(options: {
  port: number;
  portFixed: boolean;
  host?: string | undefined;
  publicUrl?: string | undefined;
  trustProxy?: boolean;
  webPort: number;
  workerPort: number;
  standbyPorts?: number[];
  trainingPort?: number | undefined;
  yard: boolean;
  rate: number;
  dataDir: string;
  notes?: string[];
}): string[];
export function partsEnvironment(options: {
  databaseUrl: string;
  dataDir: string;
  authSecret: string;
  publicUrl: string;
  webPort: number;
  workerPort: number;
  mailPort: number;
  trainingPort?: number | undefined;
  rate: number;
  yard: boolean;
}): { NODE_ENV: 'production'; [name: string]: string };
