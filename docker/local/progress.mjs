const begun = performance.now();

/** Seconds since the program started, as text with one decimal. */
export const elapsed = () => `${((performance.now() - begun) / 1000).toFixed(1)} s`;

/** One line for the person at the terminal. */
export const say = (text) => process.stdout.write(`${text}\n`);

/** Runs a step and prints how long it took. Answers what the step answers. */
export async function step(title, work) {
  const from = performance.now();
  const answer = await work();
  say(`  ${title.padEnd(44)} ${((performance.now() - from) / 1000).toFixed(1).padStart(6)} s`);
  return answer;
}

/** A fault the person can cure: printed without a stack trace. */
export class Fault extends Error {}

/** Ends the program with the message of a Fault, or with the whole error when it is a bug. */
export function giveUp(error) {
  process.stderr.write(error instanceof Fault ? `\n${error.message}\n` : `\n${error?.stack ?? String(error)}\n`);
  process.exit(1);
}
