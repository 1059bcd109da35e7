/** Waits until `condition` holds, and fails with its name when it does not within the limit. Tests wait so; they never sleep. */
export async function until(
  what: string,
  condition: () => boolean | Promise<boolean>,
  limitMs = 10_000,
): Promise<void> {
  const startedMs = performance.now();
  while (!(await condition())) {
    if (performance.now() - startedMs > limitMs) throw new Error(`Not within ${limitMs} ms: ${what}`);
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}
