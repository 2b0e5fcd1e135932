import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { type Figure, figure } from './figure.ts';

const DIST = fileURLToPath(new URL('../../dist/', import.meta.url));
/** Budget of the first screen's script, gzip. */
const BUDGET_KB = 160;

interface Chunk {
  file: string;
  imports?: string[];
  isEntry?: boolean;
}

/** Script that the first screen needs, gzip, against its budget. Needs a built client. */
export function benchFirstScreen(): Figure[] {
  const manifest = JSON.parse(readFileSync(`${DIST}.vite/manifest.json`, 'utf8')) as Record<string, Chunk>;
  const needed = new Set<string>();
  const take = (key: string): void => {
    const chunk = manifest[key];
    if (!chunk || needed.has(chunk.file)) return;
    needed.add(chunk.file);
    chunk.imports?.forEach(take);
  };
  Object.entries(manifest).filter(([, chunk]) => chunk.isEntry).forEach(([key]) => take(key));
  const bytes = [...needed].filter((file) => file.endsWith('.js')).reduce((sum, file) => sum + gzipSync(readFileSync(`${DIST}${file}`)).length, 0);
  return [figure('script of the first screen ÷ its budget', 'KB gzip', bytes / 1024, BUDGET_KB)];
}
