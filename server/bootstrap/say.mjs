/** One plain line to whoever started us. */
export function say(/** @type {string} */ text) {
  process.stdout.write(`${text}\n`);
}

/**
 * An error whose message is the whole story: what is wrong and what to type. It is printed without a stack.
 *
 * @param {string} text
 */
export function refusal(text) {
  return Object.assign(new Error(text), { name: 'Refusal' });
}

/**
 * What to print for anything thrown: a refusal's own words, everything else with its stack.
 *
 * @param {unknown} error
 */
export function wordsFor(error) {
  if (!(error instanceof Error)) return String(error);
  return error.name === 'Refusal' ? error.message : (error.stack ?? error.message);
}
