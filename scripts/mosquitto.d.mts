export function findMosquitto(): string | undefined;
export function ensureMosquitto(): string | undefined;
