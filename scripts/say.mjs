// What the commands print: one line a step, and one sentence with a way out when a step fails.

/** A failure that the person at the terminal can mend: printed as its sentence, without a stack. */
export class Trouble extends Error {
  /** @param {string} sentence what is wrong and what to do  @param {number} [code] exit code; 78 is for configuration */
  constructor(sentence, code = 1) {
    super(sentence);
    this.name = 'Trouble';
    this.code = code;
  }
}

/** Exit code for a setting that is missing or wrong (EX_CONFIG of sysexits.h). */
export const CONFIGURATION = 78;

const startedAt = performance.now();

/** @param {string} line */
export function say(line) {
  const seconds = ((performance.now() - startedAt) / 1000).toFixed(1).padStart(5);
  console.log(`${seconds} s  ${line}`);
}

/**
 * Ends the process after one sentence. Anything but a Trouble is a fault of ours, so its stack is kept: it is the report.
 * @param {unknown} error
 * @returns {never}
 */
export function giveUp(error) {
  if (error instanceof Trouble) {
    console.error(`\n${error.message}`);
    process.exit(error.code);
  }
  console.error('\nThis is a fault in Middenward itself; please report it with what follows.');
  console.error(error);
  process.exit(70);
}
