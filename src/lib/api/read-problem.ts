import { Problem } from '#shared/contract/errors.ts';
import { ApiError } from './api-error.ts';

/** What a refused answer says, or the nearest thing to it when something between us and the server answered instead. */
export async function readProblem(response: Response): Promise<ApiError> {
  const body: unknown = await response.json().catch(() => undefined);
  const problem = Problem.safeParse(body);
  if (!problem.success) {
    return new ApiError(response.status >= 500 ? 'unavailable' : 'unreadable', `HTTP ${response.status}`);
  }
  const { code, title, detail, requestId, issues, retryAfterSeconds } = problem.data;
  return new ApiError(code, detail ?? title, {
    requestId,
    ...(issues === undefined ? {} : { issues }),
    ...(retryAfterSeconds === undefined ? {} : { retryAfterSeconds }),
  });
}
