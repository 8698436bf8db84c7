/**
 * Joins class names, leaving out what does not apply.
 *
 * @example classNames('row', false, 'open') // 'row open'
 */
export const classNames = (...names: readonly (string | false | undefined)[]): string =>
  names.filter((name) => name !== false && name !== undefined && name !== '').join(' ');
