const known = new Set<string>();

/**
 * Whether a name is an IANA time zone this platform knows. Bare offsets such as `+02:00` are refused: they know no
 * daylight saving.
 *
 * @example isKnownZone('America/Phoenix') // true
 * @example isKnownZone('Mars/Olympus') // false
 */
export function isKnownZone(zone: string): boolean {
  if (known.has(zone)) return true;
  // Only real zones are remembered, so that wrong names from outside cannot fill the memory.
  const real = platformKnows(zone);
  if (real) known.add(zone);
  return real;
}

function platformKnows(zone: string): boolean {
  if (!/^[A-Za-z]/.test(zone)) return false;
  try {
    return new Intl.DateTimeFormat('en-US', { timeZone: zone }) !== undefined;
  } catch {
    return false;
  }
}
