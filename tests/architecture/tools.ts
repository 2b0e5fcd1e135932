import { spawn } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url));
const tool = (path: string): string => join(ROOT, 'node_modules', path);

/** Runs one of the project's own tools and returns what it said. */
export async function run(script: string, args: readonly string[], cwd: string): Promise<{ code: number | null; out: string; err: string }> {
  const child = spawn(process.execPath, ['--max-old-space-size=4096', tool(script), ...args], { cwd, stdio: ['ignore', 'pipe', 'pipe'] });
  const said = { out: '', err: '' };
  child.stdout.setEncoding('utf8').on('data', (text: string) => (said.out += text));
  child.stderr.setEncoding('utf8').on('data', (text: string) => (said.err += text));
  const code = await new Promise<number | null>((done, fail) => child.on('error', fail).on('close', done));
  return { code, ...said };
}

/** The compiler's complaints about all of `cwd`, with the config that lies there; empty: none. */
export async function typeErrors(cwd: string): Promise<string> {
  const { code, out, err } = await run('typescript-seven/bin/tsc', ['--project', 'tsconfig.json', '--pretty', 'false'], cwd);
  if ((code === 0) !== (out === '')) throw new Error(`tsc ended with ${code}: ${out}${err}`);
  return out;
}

export interface Violation {
  rule: string;
  file: string;
}

/** dependency-cruiser on the folders of `cwd`, with the config that lies there. */
export async function dependencyViolations(cwd: string, folders: readonly string[]): Promise<{ modules: number; violations: Violation[] }> {
  const { out, err } = await run('dependency-cruiser/bin/dependency-cruise.mjs', [...folders, '--config', '.dependency-cruiser.cjs', '--output-type', 'json'], cwd);
  if (out === '') throw new Error(err);
  const { summary } = JSON.parse(out) as { summary: { totalCruised: number; violations: { from: string; to: string; rule: { name: string } }[] } };
  return { modules: summary.totalCruised, violations: summary.violations.map(({ from, to, rule }) => ({ rule: rule.name, file: from, to })) };
}

/** ESLint on all of `cwd`, with the config that lies there. */
export async function lintViolations(cwd: string): Promise<{ files: number; violations: (Violation & { line: number; message: string })[] }> {
  const { out, err } = await run('eslint/bin/eslint.js', ['.', '--format', 'json', '--max-warnings', '0'], cwd);
  if (!out.startsWith('[')) throw new Error(err);
  const results = JSON.parse(out) as { filePath: string; messages: { ruleId: string | null; line: number; message: string }[] }[];
  const violations = results.flatMap(({ filePath, messages }) =>
    messages.map(({ ruleId, line, message }) => ({ rule: ruleId ?? 'parser', file: filePath.slice(cwd.length).replace(/^\//, ''), line, message })));
  return { files: results.length, violations };
}

/** A small tree of its own with our own rules over it, so that what is planted never lies in the project. */
export function plant(files: Readonly<Record<string, string>>): { at: string; remove(): void } {
  const at = mkdtempSync(join(tmpdir(), 'lanewright-planted-'));
  for (const name of ['.dependency-cruiser.cjs', 'eslint.config.js', 'tsconfig.json', 'package.json', 'tests/architecture/edges.cjs']) cpSync(join(ROOT, name), join(at, name));
  for (const [path, text] of Object.entries(files)) {
    mkdirSync(dirname(join(at, path)), { recursive: true });
    writeFileSync(join(at, path), text);
  }
  return { at, remove: () => rmSync(at, { recursive: true, force: true }) };
}
