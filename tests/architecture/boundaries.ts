import type { Edge } from '#tests/architecture/import-graph.ts';

/** A sentence about imports that a person can disagree with, and two made-up imports: one it refuses, one it allows. */
export type BoundaryRule = {
  readonly sentence: string;
  readonly from: RegExp;
  readonly allows: (edge: Edge) => boolean;
  readonly refused: readonly [from: string, specifier: string];
  readonly allowed: readonly [from: string, specifier: string];
};

const OURS = /^(shared|server|src|simulator|tests|drizzle)\//;
const isPackage = (to: string) => !OURS.test(to);
const isIn = (to: string, ...folders: string[]) => folders.some((folder) => to.startsWith(`${folder}/`));

/** The feature a path belongs to, on either floor: server/features/alarms/index.ts → alarms. */
export const findFeature = (path: string) => /^(?:server|src)\/features\/([^/]+)\//.exec(path)?.[1];

const isSameFeature = ({ from, to }: Edge) => findFeature(from) === findFeature(to);

export const BOUNDARY_RULES: readonly BoundaryRule[] = [
  {
    sentence: 'shared imports itself, zod in the contract, and the time-zone library in domain/time',
    from: /^shared\//,
    allows: ({ from, to }) =>
      isIn(to, 'shared') ||
      (to === 'zod' && isIn(from, 'shared/contract')) ||
      (to === '@date-fns/tz' && isIn(from, 'shared/domain/time')),
    refused: ['shared/domain/runs/run.ts', 'zod'],
    allowed: ['shared/contract/errors.ts', 'zod'],
  },
  {
    sentence: 'units import nothing but units',
    from: /^shared\/units\//,
    allows: ({ to }) => isIn(to, 'shared/units'),
    refused: ['shared/units/flow.ts', '#shared/domain/runs/run.ts'],
    allowed: ['shared/units/flow.ts', './volume.ts'],
  },
  {
    sentence: 'the domain imports units and the domain only',
    from: /^shared\/domain\//,
    allows: ({ to }) => isIn(to, 'shared/units', 'shared/domain') || isPackage(to),
    refused: ['shared/domain/runs/run.ts', '#shared/contract/errors.ts'],
    allowed: ['shared/domain/runs/run.ts', '#shared/units/flow.ts'],
  },
  {
    sentence: 'the wire contract takes types from the domain and nothing that runs',
    from: /^shared\/contract\/mqtt\//,
    allows: ({ to, isTypeOnly }) => !isIn(to, 'shared/domain') || isTypeOnly,
    refused: ['shared/contract/mqtt/readings.ts', '#shared/domain/runs/run.ts'],
    allowed: ['shared/contract/mqtt/readings.ts', '#shared/units/flow.ts'],
  },
  {
    sentence: 'the server reaches neither the browser nor the simulator',
    from: /^server\//,
    allows: ({ to }) => !isIn(to, 'src', 'simulator'),
    refused: ['server/db/seed/seed-demo.ts', '#simulator/physics/pump.ts'],
    allowed: ['server/db/seed/seed-demo.ts', '#shared/domain/runs/run.ts'],
  },
  {
    sentence: 'the browser reaches neither the server, the simulator nor Node',
    from: /^src\//,
    allows: ({ to }) => !isIn(to, 'server', 'simulator') && !to.startsWith('node:'),
    refused: ['src/lib/api-client.ts', 'node:crypto'],
    allowed: ['src/lib/api-client.ts', '#shared/contract/errors.ts'],
  },
  {
    sentence: 'the simulator knows the wire, the invented company and units, and has physics of its own',
    from: /^simulator\//,
    allows: ({ to }) =>
      isIn(to, 'simulator', 'shared/contract/mqtt', 'shared/contract/demo', 'shared/units') || isPackage(to),
    refused: ['simulator/physics/pump.ts', '#shared/domain/hydraulics/affinity-laws.ts'],
    allowed: ['simulator/link.ts', '#shared/contract/mqtt/topics.ts'],
  },
  {
    sentence: 'server features meet only at the door',
    from: /^server\/features\//,
    allows: (edge) =>
      !isIn(edge.to, 'server/features') || isSameFeature(edge) || /^server\/features\/[^/]+\/index\.ts$/.test(edge.to),
    refused: ['server/features/pumps/list-pumps.ts', '#server/features/alarms/alarm-repository.ts'],
    allowed: ['server/features/pumps/list-pumps.ts', '#server/features/alarms/index.ts'],
  },
  {
    sentence: 'platform folders of the server never import a feature',
    from: /^server\/(http|broker|ingest|fold|live|jobs|mail|log|bootstrap|db)\//,
    allows: ({ to }) => !isIn(to, 'server/features'),
    refused: ['server/fold/fold-pump.ts', '#server/features/alarms/index.ts'],
    allowed: ['server/fold/fold-pump.ts', '#server/db/transaction.ts'],
  },
  {
    sentence: 'browser features import neither one another nor the app',
    from: /^src\/features\//,
    allows: (edge) => !isIn(edge.to, 'src/app') && (!isIn(edge.to, 'src/features') || isSameFeature(edge)),
    refused: ['src/features/fleet/fleet-wall.tsx', '#src/features/alarms/alarm-queries.ts'],
    allowed: ['src/features/fleet/fleet-wall.tsx', '#src/components/charts/strip.tsx'],
  },
  {
    sentence: 'what features share in the browser never imports a feature or the app',
    from: /^src\/(components|hooks|lib)\//,
    allows: ({ to }) => !isIn(to, 'src/features', 'src/app'),
    refused: ['src/components/layout/frame.tsx', '#src/app/paths.ts'],
    allowed: ['src/components/layout/frame.tsx', '#src/hooks/use-clock.ts'],
  },
  {
    sentence: 'nobody imports tests',
    from: /^(shared|server|src|simulator)\/|^[^/]+$/,
    allows: ({ to }) => !isIn(to, 'tests'),
    refused: ['server/main.ts', '#tests/support/free-port.ts'],
    allowed: ['server/main.ts', '#server/app.ts'],
  },
  {
    sentence: 'what runs before anything is installed needs only Node',
    from: /^server\/bootstrap\/(?!development-page\.mjs$)/,
    allows: ({ to, isTypeOnly }) => isIn(to, 'server/bootstrap') || to.startsWith('node:') || isTypeOnly,
    refused: ['server/bootstrap/start.mjs', 'pg'],
    allowed: ['server/bootstrap/start.mjs', 'node:fs'],
  },
  {
    sentence: 'a relative import goes one step up at most, and never to another floor',
    from: /./,
    allows: ({ from, specifier, to }) =>
      !specifier.includes('../..') && (!specifier.startsWith('.') || from.split('/')[0] === to.split('/')[0]),
    refused: ['server/features/pumps/list-pumps.ts', '../../db/transaction.ts'],
    allowed: ['server/features/pumps/list-pumps.ts', './pump-policy.ts'],
  },
  {
    sentence: 'an import of our own says the real extension',
    from: /./,
    allows: ({ specifier }) => !/^[.#]/.test(specifier) || /\.(ts|tsx|mjs|css|json|woff2|svg)$/.test(specifier),
    refused: ['server/main.ts', './app'],
    allowed: ['src/main.tsx', './app/app.tsx'],
  },
];

/** Packages that run in one place only; their types may be named where what they made is handed on. */
export const PACKAGE_HOMES: readonly { readonly names: readonly string[]; readonly home: RegExp }[] = [
  { names: ['drizzle-orm'], home: /^server\/db\/|-(repository|read-model)\.ts$/ },
  { names: ['pg'], home: /^server\/(?!features\/)|-repository\.ts$/ },
  { names: ['express', 'helmet', 'compression'], home: /^server\/(app\.ts|http\/)|-routes\.ts$/ },
  { names: ['aedes'], home: /^server\/broker\// },
  { names: ['ws'], home: /^server\/live\// },
  { names: ['mqtt'], home: /^simulator\/link\.ts$/ },
  { names: ['nodemailer', 'smtp-server', 'mailparser'], home: /^server\/mail\// },
  { names: ['pino'], home: /^server\/log\// },
  {
    names: ['passport', 'passport-jwt', 'jsonwebtoken', '@node-rs/argon2'],
    home: /^server\/(http|features\/session)\//,
  },
  { names: ['uplot'], home: /^src\/components\/charts\// },
  { names: ['zod-openapi'], home: /^server\/http\// },
  { names: ['drizzle-kit'], home: /^drizzle\.config\.ts$/ },
];
