import { DISCLAIMER } from '#shared/domain/wording/cautions.data.ts';
import type { ComposedMail } from './compose-alarm-mail.ts';
import { escapeHtml } from './escape-html.ts';

const RULE = `\n\n${'-'.repeat(60)}\n\n`;

/**
 * One mail of the frozen parts that leave together: alone it keeps its own subject, several say how many they are. The
 * same parts always give the same mail, so that one that is sent again is the same mail again.
 */
export function gatherMail(parts: readonly ComposedMail[]): ComposedMail {
  const [first] = parts;
  const subject =
    parts.length === 1 && first !== undefined ? first.subject : `${parts.length} alarms: ${first?.subject}`;
  const text = [...parts.map((part) => part.text), DISCLAIMER].join(RULE);
  return { subject, text: `${text}\n`, html: layOut(subject, parts) };
}

function layOut(subject: string, parts: readonly ComposedMail[]): string {
  return [
    '<!doctype html><html lang="en"><head><meta charset="utf-8">',
    '<meta name="viewport" content="width=device-width, initial-scale=1">',
    `<title>${escapeHtml(subject)}</title></head>`,
    '<body style="margin:0;background:#f3f1ea;color:#1c2a33;font:16px/1.5 -apple-system,Segoe UI,Helvetica,Arial,sans-serif">',
    '<div style="max-width:640px;margin:0 auto;padding:24px 20px;background:#ffffff">',
    ...parts.map((part) => part.html),
    `<p style="border-top:1px solid #d9d4c6;padding-top:12px;font-size:13px;color:#51626d">${escapeHtml(DISCLAIMER)}</p>`,
    '</div></body></html>',
  ].join('');
}
