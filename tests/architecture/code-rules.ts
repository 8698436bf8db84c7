import type { ProjectFile } from '#tests/architecture/project-files.ts';

/** A sentence about what stands in a file, with a line it refuses in `inFile`, and one that it allows there. */
export type CodeRule = {
  readonly sentence: string;
  /** Files it speaks of. */
  readonly where: (path: string) => boolean;
  readonly forbids: RegExp;
  readonly inFile: string;
  readonly refused: string;
  readonly allowed: string;
};

const isSource = (path: string) => /^(shared|server|src|simulator)\//.test(path);
const isTest = (path: string) => path.startsWith('tests/');

/** These files name what they forbid. */
const isRuleBook = (path: string) => path.startsWith('tests/architecture/');

export const CODE_RULES: readonly CodeRule[] = [
  {
    sentence: 'time and chance are injected into shared code and into the simulator’s physics',
    where: (path) => /^(shared|simulator\/physics)\//.test(path),
    forbids:
      /\bDate\.now\b|\bnew Date\(\s*\)|\bMath\.random\b|\bperformance\.now\b|\bcrypto\.(randomUUID|getRandomValues)\b/,
    inFile: 'shared/domain/runs/run.ts',
    refused: 'const now = new Date();',
    allowed: 'const at = new Date(atMs);',
  },
  {
    sentence: 'the environment is read in one place a program',
    where: (path) => isSource(path) && !/^(server\/env\.ts|simulator\/env\.ts|server\/bootstrap\/.*\.mjs)$/.test(path),
    forbids: /\bprocess\.env\b/,
    inFile: 'server/mail/send-mail.ts',
    refused: 'const url = process.env.SMTP_URL;',
    allowed: 'const url = env.smtpUrl;',
  },
  {
    sentence: 'the browser calls the server in src/lib only',
    where: (path) => path.startsWith('src/') && !path.startsWith('src/lib/'),
    forbids: /(?<![\w.])fetch\(|\bnew WebSocket\(|\bnew EventSource\(|\bXMLHttpRequest\b/,
    inFile: 'src/features/fleet/fleet-queries.ts',
    refused: "const rows = await fetch('/api/pumps');",
    allowed: 'await query.refetch();',
  },
  {
    sentence: 'nothing is exported without a name',
    where: (path) => isSource(path) || isTest(path),
    forbids: /^export default\b|\bas default\b/m,
    inFile: 'src/app/app.tsx',
    refused: 'export default App;',
    allowed: 'export { App };',
  },
  {
    sentence: 'types are types',
    where: (path) => isSource(path) || isTest(path),
    // Only an interface can be widened from outside, and Vitest's is meant to be.
    forbids: /^\s*(export\s+|declare\s+)*interface\s+(?!ProvidedContext\b)\w/m,
    inFile: 'shared/domain/runs/run.ts',
    refused: 'export interface Run {',
    allowed: 'export type Run = {',
  },
  {
    sentence: 'nothing is any',
    where: (path) => isSource(path),
    forbids: /(?<![\w'"])(:|as|<|\|)\s*any\b(?![\w'" ]*['"])/,
    inFile: 'server/app.ts',
    refused: 'const body = request.body as any;',
    allowed: 'const body: unknown = request.body;',
  },
  {
    sentence: 'nothing is left for later',
    where: (path) => !isRuleBook(path),
    forbids: /\b(TODO|FIXME|XXX|HACK)\b/,
    inFile: 'server/app.ts',
    refused: '// TODO: answer',
    allowed: '// Answers once.',
  },
  {
    sentence: 'every test runs',
    where: (path) => isTest(path) && !isRuleBook(path),
    forbids: /\b(it|test|describe)\.(only|skip|todo|skipIf|runIf|fails)\b|\b(x|f)(it|describe)\(/,
    inFile: 'tests/server/app.test.ts',
    refused: "it.skip('answers', () => {",
    allowed: "it('answers', () => {",
  },
  {
    sentence: 'no test sleeps',
    where: (path) => /^tests\/.*\.test\.tsx?$/.test(path) && !isRuleBook(path),
    forbids: /await\s+(sleep|delay)\(|setTimeout\(\s*(resolve|done|r)\b|timers\/promises/,
    inFile: 'tests/server/app.test.ts',
    refused: 'await new Promise((resolve) => setTimeout(resolve, 500));',
    allowed: 'await running.says(RUNNING);',
  },
  {
    sentence: 'nothing points at somebody’s own machine or at a conversation',
    where: (path) => !isRuleBook(path),
    forbids: /(?<![\w/.])\/(home|Users|work|root)\/\w|\bissue #?\d/i,
    inFile: 'server/app.ts',
    refused: '// see issue 2',
    allowed: '// see RFC 9457',
  },
];

/** Lines of a file that a rule refuses, in words. Comments count: what is left for later is said in them. */
export function listBrokenLines(rule: CodeRule, { path, text }: ProjectFile): string[] {
  if (!rule.where(path)) return [];
  return text
    .split('\n')
    .flatMap((line, index) => (rule.forbids.test(line) ? [`${path}:${index + 1} ${line.trim()}`] : []));
}
