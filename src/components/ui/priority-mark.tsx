import type { Priority } from '#shared/domain/detectors/detector.ts';
import { t } from '#src/lib/messages/t.ts';

/** A pen mark: how urgent, whether somebody has seen it, or that a pump is silent. */
export type MarkKind = Priority | 'silent';

const STROKES: Readonly<Record<MarkKind, number>> = { urgent: 3, soon: 2, note: 1, silent: 1 };

const TONE: Readonly<Record<MarkKind, string>> = {
  urgent: 'text-p1',
  soon: 'text-p2',
  note: 'text-p3',
  silent: 'text-ink-2',
};

export type PriorityMarkProps = {
  readonly kind: MarkKind;
  readonly acknowledged: boolean;
  /** Where the words stand beside it, it is decoration. */
  readonly decorative?: boolean;
};

/** Priorities are pen strokes: three, two, one, or one broken. On a filled block until somebody acknowledges. */
export function PriorityMark({ kind, acknowledged, decorative = false }: PriorityMarkProps) {
  const count = STROKES[kind];
  const filled = !acknowledged && kind !== 'silent';
  const left = 13 - (count * 7 - 3) / 2;
  const name = filled ? t('mark.unacknowledged', { what: t(`mark.${kind}`) }) : t(`mark.${kind}`);
  return (
    <svg
      width="26"
      height="24"
      viewBox="0 0 26 24"
      className={`shrink-0 ${TONE[kind]}`}
      role="img"
      aria-hidden={decorative}
      aria-label={name}
    >
      {filled ? <rect width="26" height="24" fill="currentColor" /> : null}
      {Array.from({ length: count }, (_, index) => (
        <path
          // biome-ignore lint/suspicious/noArrayIndexKey: strokes are alike and never reordered.
          key={index}
          d={`M${left + 2 + index * 7} 4v16`}
          strokeWidth="4"
          className={filled ? 'stroke-sheet' : 'stroke-current'}
          strokeDasharray={kind === 'silent' ? '3 3.5' : undefined}
        />
      ))}
    </svg>
  );
}
