import { Preferences, type Session } from '#shared/contract/http/session.ts';
import type { Person } from './session-repository.ts';

/** The first letters of the first and the last word of a name. */
const initialsOf = (name: string): string => {
  const words = name.split(/\s+/).filter((word) => word !== '');
  const letters = words.length > 1 ? [words.at(0), words.at(-1)] : words;
  return letters.map((word) => Array.from(word ?? '')[0]?.toUpperCase() ?? '').join('');
};

export function presentSession(
  person: Person,
  times: { readonly accessUntil: number; readonly serverNow: number },
): Session {
  const { userId, name, email, role, companyId, companyName, companyZone, companyPhone, preferences } = person;
  return {
    user: { id: userId, name, initials: initialsOf(name), email, role },
    company: { id: companyId, name: companyName, zone: companyZone, phone: companyPhone },
    // What is stored may be older than a preference that exists now.
    preferences: Preferences.parse(preferences),
    ...times,
  };
}
