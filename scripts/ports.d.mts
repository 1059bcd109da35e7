export function isFree(port: number, hosts?: string[]): Promise<boolean>;
export function nextFree(from: number, hosts?: string[]): Promise<number>;
export function anyFree(): Promise<number>;
export function severalFree(count: number): Promise<number[]>;
