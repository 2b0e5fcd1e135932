import { expect, it } from 'vitest';
import { patient } from './patient.ts';

const failing = (times: number) => {
  let tried = 0;
  return { load: () => (++tried <= times ? Promise.reject(new TypeError('Failed to fetch')) : Promise.resolve('code')), tried: () => tried };
};

it('tries again until the server is back', async () => {
  const once = failing(2);
  expect(await patient(once.load, 1)).toBe('code');
  expect(once.tried()).toBe(3);
});
it('gives up in the end, with the reason', async () => {
  const gone = failing(Infinity);
  await expect(patient(gone.load, 0)).rejects.toThrow('Failed to fetch');
  expect(gone.tried()).toBe(30);
});
