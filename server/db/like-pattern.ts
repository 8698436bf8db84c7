/**
 * A search text as an `ilike` pattern that finds it anywhere; what would be a wildcard in it stands for itself.
 *
 * @example likePattern('50%') // '%50\\%%'
 */
export const likePattern = (text: string): string => `%${text.replaceAll(/[\\%_]/g, '\\$&')}%`;
