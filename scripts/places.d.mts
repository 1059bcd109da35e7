export const ROOT: string;
export const BUILD: string;
export const MIGRATIONS: string;
export function dataFolder(value?: string): string;
export function isCommand(url: string): boolean;
