export function ensurePackages(root?: string): void;
export function areInstalled(root?: string): boolean;
