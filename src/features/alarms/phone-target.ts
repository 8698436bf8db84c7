/** On a phone every button of a row is as high as a finger needs; at a desk rows stay close. */
export const PHONE_TARGET = 'max-sm:min-h-touch';
