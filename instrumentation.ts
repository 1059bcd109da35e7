/** Next calls this once when the web process starts. */
export async function register(): Promise<void> {
  // Next compiles this file for its other runtime too, where there is no database client to import.
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { watchControl } = await import('@/lib/server/control-watch');
  watchControl();
}
