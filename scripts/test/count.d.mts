export interface Report {
  numPassedTests: number;
  numFailedTests: number;
  testResults: { status: string; assertionResults: unknown[] }[];
}
export function countTests(report: Report | null, exitCode: number): { passed: number; failed: number };
