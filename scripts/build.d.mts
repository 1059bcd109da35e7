export const PROGRAMS: Record<string, string>;
export function build(names?: string[]): Promise<void>;
export function bundleSettings(): {
  absWorkingDir: string;
  bundle: true;
  platform: 'node';
  target: string;
  format: 'esm';
  packages: 'external';
  sourcemap: 'linked';
  alias: Record<string, string>;
  logLevel: 'silent';
};
