import type { MailCause, MailSection } from './compose-alarm-mail.ts';
import { LIKELY_TITLES } from './likely-titles.ts';

/** One alarm as plain text. */
export function writeSectionText(section: MailSection): string {
  const blocks = [
    `${section.priority.toUpperCase()}: ${section.title}`,
    section.lead,
    section.facts.map(({ name, value }) => `${`${name}:`.padEnd(10)}${value}`).join('\n'),
    section.meaning,
    list(
      'What speaks for it',
      section.evidence.map(({ name, value }) => `- ${name}: ${value}`),
    ),
    list(LIKELY_TITLES[section.likely.guess ? 'guess' : 'certain'], section.likely.causes.map(causeLines)),
    list(
      'Look at first',
      section.look.map(({ what, why }, index) => `${index + 1}. ${what} (${why})`),
    ),
    list(
      section.cautionTitle,
      section.cautions.map((line) => `- ${line}`),
    ),
    `The alarm, its readings and the button to acknowledge it:\n${section.link}`,
  ];
  return blocks.filter((block) => block !== undefined).join('\n\n');
}

function list(title: string, lines: readonly string[]): string | undefined {
  return lines.length === 0 ? undefined : `${title}\n${lines.join('\n')}`;
}

const causeLines = ({ name, check, reasons }: MailCause, index: number): string =>
  [`${index + 1}. ${name}`, ...reasons.map((reason) => `   ${reason}`), `   tell by: ${check}`].join('\n');
