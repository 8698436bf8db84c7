/** A UUID that a test can recognise: kind and number can be read off it. */
export function fakeId(kind: 'pump' | 'pad' | 'alarm' | 'user' | 'company' | 'tariff', number: number): string {
  const kinds = { pump: '1', pad: '2', alarm: '3', user: '4', company: '5', tariff: '6' } as const;
  return `0000000${kinds[kind]}-0000-4000-8000-${String(number).padStart(12, '0')}`;
}
