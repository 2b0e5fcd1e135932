// `npm run dev`: the server starts anew when what it is made of changes. The browser's side is Vite's own to reload.
import fs from 'node:fs';
import path from 'node:path';
import { root } from './steps.mjs';

const FOLDERS = ['server', 'jobs', 'migrations', 'seeds', 'src/shared'];
/** Editors write a file in several goes, and a branch switch many files. */
const QUIET_MS = 200;

/** Calls `onChange` with the file, once after a burst of changes; returns what ends the watch. */
export function watchSources(onChange) {
  let timer;
  const watchers = FOLDERS.map((folder) => path.join(root, folder))
    .filter((folder) => fs.existsSync(folder))
    .map((folder) =>
      fs.watch(folder, { recursive: true }, (_event, name) => {
        if (!name || !/\.(ts|mjs)$/.test(name) || /\.test\.ts$/.test(name)) return;
        clearTimeout(timer);
        timer = setTimeout(() => onChange(path.relative(root, path.join(folder, name))), QUIET_MS);
      }),
    );
  return () => {
    clearTimeout(timer);
    for (const watcher of watchers) watcher.close();
  };
}
