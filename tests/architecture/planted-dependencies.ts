/** One breach of each rule of `.dependency-cruiser.cjs`: the file that breaks it and what it says. Targets are in `GROUND`. */
export interface Planted {
  rule: string;
  file: string;
  text: string;
  /** Files that make up a breach together with it. */
  with?: Record<string, string>;
}

const nothing = 'export const nothing = 0;\n';

/** What the breaches reach for, and neighbours that break nothing. */
export const GROUND: Record<string, string> = {
  'server/config.ts': "import { env } from 'node:process';\nexport const config = env;\n",
  'server/compose.ts': "import { calls } from './capabilities/calls/index.ts';\nimport { floor } from './capabilities/floor/index.ts';\nexport const all = [calls, floor];\n",
  'server/platform/db/database.ts': "import knex from 'knex';\nexport const db = knex;\n",
  'server/platform/auth/sessions.ts': "import { Lucia } from 'lucia';\nexport const lucia = Lucia;\n",
  'server/capabilities/calls/index.ts': "export { store as calls } from './store.ts';\n",
  'server/capabilities/calls/store.ts': "import knex from 'knex';\nimport { db } from '#server/platform/db/database.ts';\nexport const store = [knex, db];\n",
  'server/capabilities/floor/index.ts': "import { calls } from '#server/capabilities/calls/index.ts';\nexport const floor = calls;\n",
  'src/shared/contracts/calls.ts': "import * as z from 'zod/mini';\nimport { pure } from '../domain/floor/pure.ts';\nexport const contract = [z, pure];\n",
  'src/shared/domain/floor/pure.ts': "import { day } from '../business-day.ts';\nexport const pure = day;\n",
  'src/shared/domain/business-day.ts': "import { Temporal } from 'temporal-polyfill';\nexport const day = Temporal;\n",
  'src/shared/domain/numbers/rates.ts': "import quantile from '@stdlib/stats-base-dists-beta-quantile';\nexport const rate = quantile;\n",
  'src/ui/button.tsx': nothing,
  'src/app/realtime.ts': "import { calls } from '../features/calls/index.ts';\nexport const loop = calls;\n",
  'src/features/calls/index.ts': "export { page as calls } from './calls-page.tsx';\n",
  'src/features/calls/calls-page.tsx': "import { contract } from '#shared/contracts/calls.ts';\nexport const page = contract;\n",
  'src/features/floor/index.ts': "import { calls } from '../calls/index.ts';\nexport const floor = calls;\n",
};

/** Packages as far as the rules see them: a name to resolve. */
export const PACKAGES = ['knex', 'lucia', 'zod', 'temporal-polyfill', '@stdlib/stats-base-dists-beta-quantile', 'react'];

const breach = (rule: string, file: string, target: string, more?: Record<string, string>): Planted => ({ rule, file, text: `import * as found from '${target}';\nexport const use = found;\n`, with: more });

export const PLANTED: readonly Planted[] = [
  breach('no-circular', 'server/platform/db/one.ts', './two.ts', { 'server/platform/db/two.ts': "import { use } from './one.ts';\nexport const other = () => use;\n" }),
  breach('resolves', 'server/platform/db/astray.ts', '#server/platform/nowhere.ts'),
  breach('domain-is-pure', 'src/shared/domain/floor/with-zod.ts', 'zod'),
  breach('domain-is-pure', 'src/shared/domain/floor/with-node.ts', 'node:fs'),
  breach('domain-is-pure', 'src/shared/domain/floor/with-contract.ts', '#shared/contracts/calls.ts'),
  breach('temporal-in-business-day-only', 'src/shared/domain/floor/with-zone.ts', 'temporal-polyfill'),
  breach('distributions-in-numbers-only', 'src/shared/domain/floor/with-chance.ts', '@stdlib/stats-base-dists-beta-quantile'),
  breach('shared-stands-alone', 'src/shared/text/en/with-server.ts', '#server/config.ts'),
  breach('shared-stands-alone', 'src/shared/contracts/with-screen.ts', '../../ui/button.tsx'),
  breach('shared-needs-zod-only', 'src/shared/text/en/with-react.ts', 'react'),
  breach('client-no-node', 'src/lib/with-node.ts', 'node:crypto'),
  breach('client-not-server', 'src/features/floor/with-server.ts', '#server/platform/db/database.ts'),
  breach('server-not-client', 'server/capabilities/floor/with-screen.ts', '../../../src/ui/button.tsx'),
  breach('client-one-way', 'src/ui/with-feature.tsx', '../features/calls/index.ts'),
  breach('client-one-way', 'src/lib/with-app.ts', '../app/realtime.ts'),
  breach('features-not-app', 'src/features/calls/with-app.ts', '../../app/realtime.ts'),
  breach('features-by-front-door', 'src/features/floor/by-window.ts', '../calls/calls-page.tsx'),
  breach('slices-by-front-door', 'server/capabilities/floor/by-window.ts', '../calls/store.ts'),
  breach('slices-by-front-door', 'server/capabilities/floor/by-window-alias.ts', '#server/capabilities/calls/store.ts'),
  breach('others-by-front-door', 'jobs/by-window.ts', '#server/capabilities/calls/store.ts'),
  breach('platform-knows-no-slice', 'server/platform/realtime/with-slice.ts', '#server/capabilities/calls/index.ts'),
  breach('knex-in-stores-only', 'server/capabilities/calls/commands.ts', 'knex'),
  breach('lucia-one-folder', 'server/capabilities/accounts/with-lucia.ts', 'lucia'),
  breach('fakes-stand-outside', 'server/fakes/gateway/with-platform.ts', '#server/platform/db/database.ts'),
  breach('env-in-config-only', 'server/platform/with-env.ts', 'node:process'),
  breach('edge-capabilities-calls', 'server/capabilities/calls/with-floor.ts', '#server/capabilities/floor/index.ts'),
  breach('edge-features-calls', 'src/features/calls/with-floor.ts', '../floor/index.ts'),
];
