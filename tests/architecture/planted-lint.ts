/** One breach of each lint rule that the architecture rests on. */
export interface PlantedLint {
  rule: string;
  file: string;
  text: string;
}

const lines = (count: number): string => Array.from({ length: count }, (_, i) => `  sum += ${i};`).join('\n');
const inFunction = (body: string): string => `export function planted(): unknown {\n${body}\n}\n`;
const server = (name: string): string => `server/platform/${name}.ts`;
const domain = (name: string): string => `src/shared/domain/floor/${name}.ts`;
const screen = (name: string): string => `src/features/floor/${name}.tsx`;
const element = (jsx: string): string => `export function Planted() {\n  return ${jsx};\n}\n`;

export const PLANTED_LINT: readonly PlantedLint[] = [
  { rule: '@typescript-eslint/no-floating-promises', file: server('floating'), text: 'export const go = async (): Promise<void> => undefined;\nexport function planted(): void {\n  go();\n}\n' },
  { rule: '@typescript-eslint/no-misused-promises', file: server('misused'), text: 'export const planted = (list: number[]): void => list.forEach(async () => undefined);\n' },
  { rule: '@typescript-eslint/no-explicit-any', file: server('any'), text: 'export const planted: any = 1;\n' },
  { rule: '@typescript-eslint/no-non-null-assertion', file: server('non-null'), text: 'export const planted = (list: number[]): number => list[0]!;\n' },
  { rule: '@typescript-eslint/consistent-type-imports', file: server('type-import'), text: "import { Buffer } from 'node:buffer';\nexport type Planted = Buffer;\n" },
  { rule: '@typescript-eslint/switch-exhaustiveness-check', file: server('switch'), text: "export function planted(side: 'left' | 'right'): number {\n  switch (side) {\n    case 'left':\n      return 1;\n  }\n  return 0;\n}\n" },
  { rule: '@typescript-eslint/no-unnecessary-type-assertion', file: server('assertion'), text: 'const one: number = 1;\nexport const planted = one as number;\n' },
  { rule: 'max-lines', file: server('long-file'), text: Array.from({ length: 301 }, (_, i) => `export const a${i} = ${i};`).join('\n') },
  { rule: 'max-lines-per-function', file: server('long-function'), text: inFunction(`  let sum = 0;\n${lines(60)}\n  return sum;`) },
  { rule: 'max-lines-per-function', file: screen('long-component'), text: `export function Planted() {\n  let sum = 0;\n${lines(90)}\n  return sum;\n}\n` },
  { rule: 'no-restricted-syntax', file: server('default'), text: 'export default 1;\n' },
  { rule: 'no-restricted-syntax', file: 'server/capabilities/calls/emits.ts', text: "export const planted = (io: { emit(name: string): void }): void => io.emit('call');\n" },
  { rule: 'no-restricted-syntax', file: 'src/features/floor/listens.ts', text: "export const planted = (socket: { on(name: string): void }): void => socket.on('call');\n" },
  { rule: 'eqeqeq', file: server('equal'), text: 'export const planted = (a: unknown): boolean => a == 1;\n' },
  { rule: 'no-console', file: server('console'), text: "export const planted = (): void => console.log('here');\n" },
  { rule: 'no-restricted-properties', file: server('env'), text: "export const planted = process.env['PORT'];\n" },
  { rule: 'no-restricted-syntax', file: domain('date-now'), text: 'export const planted = (): number => Date.now();\n' },
  { rule: 'no-restricted-syntax', file: domain('new-date'), text: 'export const planted = (): Date => new Date();\n' },
  { rule: 'no-restricted-syntax', file: domain('random'), text: 'export const planted = (): number => Math.random();\n' },
  { rule: 'no-restricted-syntax', file: domain('waits'), text: 'export const planted = async (p: Promise<number>): Promise<number> => await p;\n' },
  { rule: 'no-restricted-globals', file: domain('process'), text: 'export const planted = (): number => process.uptime();\n' },
  { rule: 'no-restricted-globals', file: domain('fetches'), text: "export const planted = (): unknown => fetch('/');\n" },
  { rule: 'no-restricted-imports', file: 'server/capabilities/calls/with-express.ts', text: "import express from 'express';\nexport const planted = express;\n" },
  { rule: 'no-restricted-imports', file: 'server/capabilities/calls/with-sockets.ts', text: "import { Server } from 'socket.io';\nexport const planted = Server;\n" },
  { rule: 'no-restricted-syntax', file: screen('literal-text'), text: element('<p>Lane closed</p>') },
  { rule: 'no-restricted-syntax', file: screen('literal-braces'), text: element("<p>{'Lane closed'}</p>") },
  { rule: 'no-restricted-syntax', file: screen('literal-label'), text: element('<div aria-label="Lane closed" />') },
  { rule: 'jsx-a11y/alt-text', file: screen('picture'), text: element('<img src="/a.png" />') },
  { rule: 'jsx-a11y/click-events-have-key-events', file: screen('click'), text: element('<div onClick={() => undefined} />') },
  { rule: 'react-hooks/rules-of-hooks', file: screen('hook'), text: "import { useState } from 'react';\nexport function Planted({ on }: { on: boolean }) {\n  if (on) useState(0);\n  return null;\n}\n" },
  { rule: 'react-hooks/exhaustive-deps', file: screen('effect'), text: "import { useEffect } from 'react';\nexport function Planted({ on }: { on: (n: number) => void }) {\n  useEffect(() => on(1), []);\n  return null;\n}\n" },
  { rule: '@tanstack/query/exhaustive-deps', file: screen('query'), text: "import { useQuery } from '@tanstack/react-query';\nexport function Planted({ lane }: { lane: number }) {\n  useQuery({ queryKey: ['lane'], queryFn: () => fetch(`/lanes/${lane}`) });\n  return null;\n}\n" },
];

/** Files that break nothing although they come close: the rules are no wider than they say. */
export const SOUND: Record<string, string> = {
  'server/cli/says.ts': "console.log('here');\n",
  'server/config.ts': "export const port = process.env['PORT'];\n",
  'server/platform/realtime/emits.ts': "export const sound = (io: { emit(name: string): void }): void => io.emit('call');\n",
  'src/shared/domain/floor/dates.ts': 'export const sound = (at: number): string => new Date(at).toISOString();\n',
  'src/features/floor/sound.tsx': "import { wording } from '#shared/text/en/floor.ts';\nexport function Sound({ lane }: { lane: number }) {\n  return <p className=\"text-ink\" title={wording}>{wording} · {lane}</p>;\n}\n",
  'src/shared/text/en/floor.ts': "export const wording = 'Lane';\n",
};
