import { refusal } from './say.mjs';

/** The oldest Node.js that every package runs on; package.json says the same to npm. */
const OLDEST = { major: 20, minor: 19 };

/** @param {string} [version] */
export function refuseOldNode(version = process.versions.node) {
  const [major = 0, minor = 0] = version.split('.').map(Number);
  if (major > OLDEST.major || (major === OLDEST.major && minor >= OLDEST.minor)) return;
  throw refusal(`Millrace needs Node.js ${OLDEST.major}.${OLDEST.minor} or later; this is ${version}.`);
}
