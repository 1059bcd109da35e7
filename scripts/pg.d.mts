export const OWNER: string;
export const APP: string;
export interface Postgres {
  /** as the app's role */
  url: string;
  /** as the owner of the tables, who may also create databases */
  ownerUrl: string;
  adminUrl: string;
  started: boolean;
  /** false when DATABASE_URL named a server */
  own: boolean;
}
export function ensurePostgres(options?: {
  dataDir?: string;
  databaseUrl?: string | undefined;
  fast?: boolean;
  port?: number | undefined;
}): Promise<Postgres>;
export function stopPostgres(options?: { dataDir?: string }): string;
/** Makes the data folder, or says that it cannot be written. */
export function makeFolder(dataDir: string): void;
