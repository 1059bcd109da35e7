/** Applies what is missing under an advisory lock and answers how many migrations that were. */
export function runMigrations(ownerUrl: string, folder?: string): Promise<number>;
