import type { LinkState } from '../live/link-state.ts';
import { liveLink } from '../live/live-link.ts';
import { t } from '../messages/t.ts';
import { type ApiErrorCode, isApiError } from './api-error.ts';

export type ErrorWords = {
  readonly title: string;
  readonly detail: string;
  readonly requestId: string | undefined;
  /** Whether asking once more may help. */
  readonly retryable: boolean;
};

const RETRYABLE: readonly ApiErrorCode[] = ['unreachable', 'unavailable', 'internal', 'rate-limited'];

type Worded = Exclude<ApiErrorCode, 'precondition-failed' | 'precondition-required' | 'too-large'>;

/** Codes that share another one's words: the difference is the program's, not the person's. */
const WORDED_AS: Readonly<Record<ApiErrorCode, Worded>> = {
  validation: 'validation',
  unauthenticated: 'unauthenticated',
  forbidden: 'forbidden',
  'not-found': 'not-found',
  conflict: 'conflict',
  'precondition-failed': 'conflict',
  'precondition-required': 'conflict',
  'too-large': 'validation',
  'rate-limited': 'rate-limited',
  internal: 'internal',
  unavailable: 'unavailable',
  unreachable: 'unreachable',
  unreadable: 'unreadable',
};

/** A part of the program did not come: the server is away, or the page is older than the last update and asks in vain. */
export const isMissingCode = (error: unknown): boolean =>
  error instanceof TypeError && /import|module script/i.test(error.message);

const LOST: readonly LinkState['phase'][] = ['broken', 'offline'];

/** What went wrong and what to do, for any error a page can meet. */
export function describeError(error: unknown): ErrorWords {
  if (isMissingCode(error)) {
    if (LOST.includes(liveLink.get().phase))
      return {
        title: t('error.unreachable'),
        detail: t('error.unreachable.detail'),
        requestId: undefined,
        retryable: true,
      };
    return { title: t('error.updated'), detail: t('error.updated.detail'), requestId: undefined, retryable: false };
  }
  if (!isApiError(error)) {
    return { title: t('error.page'), detail: t('error.internal.detail'), requestId: undefined, retryable: true };
  }
  const worded = WORDED_AS[error.code];
  const issues = error.issues.map(({ path, message }) => `${path}: ${message}`).join('; ');
  return {
    title: t(`error.${worded}`),
    detail:
      worded === 'validation'
        ? t('error.validation.detail', { issues: issues === '' ? error.message : issues })
        : t(`error.${worded}.detail`),
    requestId: error.requestId,
    retryable: RETRYABLE.includes(error.code),
  };
}
