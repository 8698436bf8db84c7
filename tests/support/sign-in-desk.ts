import type { Pools } from '#server/db/pools.ts';
import { type CookieJar, createCookieJar } from '#tests/support/cookie-jar.ts';
import { makeTestCompany, TEST_PASSWORD, type TestCompany, type TestPerson } from '#tests/support/test-company.ts';
import { openTestPools } from '#tests/support/test-pools.ts';
import { startTestServer, type TestAnswer, type TestServer } from '#tests/support/test-server.ts';

/** A server, a company and browsers that sign in. */
export type SignInDesk = {
  readonly pools: Pools;
  readonly server: TestServer;
  readonly company: TestCompany;
  /** An address nobody else uses, as the proxy in front names it. */
  readonly freshAddress: () => Record<string, string>;
  readonly signIn: (person: TestPerson, password?: string, headers?: Record<string, string>) => Promise<TestAnswer>;
  readonly signInto: (person: TestPerson) => Promise<CookieJar>;
  /** Asks as the browser of a jar, which takes the cookies that are answered. */
  readonly askWith: (jar: CookieJar, method: string, path: string, body?: unknown) => Promise<TestAnswer>;
  /** What the audit trail says about a person, oldest first. */
  readonly listAudits: (person: TestPerson) => Promise<string[]>;
};

export async function openSignInDesk(): Promise<SignInDesk> {
  const pools = await openTestPools();
  const server = await startTestServer(pools);
  const company = await makeTestCompany(pools.machine);
  const freshAddress = () => ({
    'X-Forwarded-For': crypto
      .randomUUID()
      .replaceAll('-', '')
      .replace(/.{4}(?!$)/g, '$&:'),
  });
  const signIn: SignInDesk['signIn'] = ({ email }, password = TEST_PASSWORD, headers = freshAddress()) =>
    server.ask('POST', '/api/session', { body: { email, password }, headers });
  return {
    pools,
    server,
    company,
    freshAddress,
    signIn,
    signInto: async (person) => {
      const jar = createCookieJar();
      jar.take((await signIn(person)).headers);
      return jar;
    },
    askWith: async (jar, method, path, body) => {
      const answer = await server.ask(method, path, { headers: jar.header(), body });
      jar.take(answer.headers);
      return answer;
    },
    listAudits: async ({ userId }) => {
      const text = 'select action from audit_entries where subject_id = $1 order by at, id';
      const { rows } = await pools.machine.query<{ action: string }>(text, [userId]);
      return rows.map(({ action }) => action);
    },
  };
}
