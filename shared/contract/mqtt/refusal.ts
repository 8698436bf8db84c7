/** Why a whole message is refused. */
export const MESSAGE_REFUSALS = ['not-json', 'not-an-object', 'empty', 'too-many'] as const;
export type MessageRefusal = (typeof MESSAGE_REFUSALS)[number];

/** Why one reading is refused: the first fault found, by the wire's own field names. */
export const READING_REFUSALS = [
  'reading-not-an-object',
  't-missing',
  't-not-an-integer',
  't-out-of-range',
  't-not-increasing',
  'ahead',
  'too-old',
  'rpm-missing',
  'rpm-not-a-number',
  'rpm-negative',
  'rpm-out-of-range',
  'in-missing',
  'in-not-an-integer',
  'in-out-of-range',
  'in-beyond-model',
  'act-missing',
  'act-not-an-integer',
  'act-out-of-range',
  'act-beyond-model',
  'w-missing',
  'w-not-a-number',
  'w-negative',
  'w-out-of-range',
] as const;
export type ReadingRefusal = (typeof READING_REFUSALS)[number];

/** The fields of a reading that are dropped alone when they are bad. */
export type OptionalReadingField = 'src' | 'v' | 'td' | 'ta' | 'mc' | 'flt';

export type RefusedMessage = { readonly kind: 'refused'; readonly reason: MessageRefusal };
