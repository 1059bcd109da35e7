export const PROGRAMS: Record<string, string>;
export function build(names?: string[]): Promise<void>;
