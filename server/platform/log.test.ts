import { expect, test } from 'vitest';
import { createLog } from './log.ts';

const written = (level: string, log: (logger: ReturnType<typeof createLog>) => void): string => {
  let text = '';
  log(createLog(level, { write: (line: string) => (text += line) }));
  return text;
};

test('what lets somebody in is struck out wherever it comes up', () => {
  const text = written('info', (log) => {
    log.info({ req: { headers: { cookie: 'secret-1', authorization: 'Bearer secret-2' } }, res: { headers: { 'set-cookie': ['secret-3'] } } });
    log.info({ body: { email: 'manager@centre.test', password: 'secret-4' }, password: 'secret-5', key: 'secret-6', link: { token: 'secret-7' } });
  });
  expect(text).not.toMatch(/secret-\d/);
  expect(text.match(/\[struck out\]/g)).toHaveLength(7);
  expect(text).toContain('manager@centre.test');
});

test('the level says what is written', () => {
  expect(written('warn', (log) => log.info('quiet'))).toBe('');
  expect(JSON.parse(written('warn', (log) => log.warn({ lane: 12 }, 'loud')))).toMatchObject({ msg: 'loud', lane: 12, level: 40 });
});
