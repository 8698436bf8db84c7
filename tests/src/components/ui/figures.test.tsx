import { renderToStaticMarkup } from 'react-dom/server';
import { expect, it } from 'vitest';
import { Figures } from '#src/components/ui/figures.tsx';

const markup = (text: string) => renderToStaticMarkup(<Figures text={text} />);
const words = (text: string) => markup(text).replaceAll(/<[^>]*>/g, '');

it('keeps a unit with its figure, and every letter of the sentence', () => {
  for (const text of [
    'Running at 1,400 rpm, 24 % less.',
    '241 kWh',
    'No. 7: 3 m',
    '12',
    'none',
    '5 minutes',
    '40 °F or 4.4 °C',
  ])
    expect(words(text)).toBe(text);
  expect(markup('Running at 1,400 rpm.')).toContain('1,400</span> rpm</span>.');
});

it('takes no word for a unit', () => {
  expect(markup('after 5 minutes')).toContain('5</span></span> minutes');
  expect(markup('3 more')).toContain('3</span></span> more');
});
