/** A reason to end that a person can act on: printed as it is, without a stack. */
export class Stop extends Error {
  /**
   * @param {string} message whole sentences; the last one says what to do
   * @param {number} code exit code: 0 nothing to do, 1 failed, 2 asked wrongly
   */
  constructor(message, code = 1) {
    super(message);
    this.name = 'Stop';
    this.code = code;
  }
}

/** One line to the person at the terminal. @param {string} line */
export function say(line) {
  process.stdout.write(`${line}\n`);
}

/**
 * Runs a command's main function and turns what it throws into an exit code.
 * @param {() => Promise<number | undefined>} main
 */
export async function run(main) {
  try {
    process.exitCode = (await main()) ?? 0;
  } catch (error) {
    if (!(error instanceof Stop)) throw error;
    process.stderr.write(`${error.message}\n`);
    process.exitCode = error.code;
  }
}

/** Seconds with one decimal since `from` (a performance.now() value). @param {number} from */
export function since(from) {
  return `${((performance.now() - from) / 1000).toFixed(1)} s`;
}
