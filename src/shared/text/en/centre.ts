import type { Sentences } from './sentences.ts';

const span = (ms: number): string => {
  const s = Math.round(Math.abs(ms) / 1000);
  return s < 90 ? `${s} s` : `${Math.floor(s / 60)} min${s % 60 === 0 ? '' : ` ${s % 60} s`}`;
};

/** What is wrong with a gateway, as it stands on floor and settings. */
export const gatewayText = {
  clock: (errorMs: number): string => `Its clock is ${span(errorMs)} ${errorMs > 0 ? 'fast' : 'slow'}; times are corrected by that`,
  changedRepeats: (count: number): string => `${count === 1 ? 'An event came' : `${count} events came`} a second time with other content; the first stands`,
  silent: 'Nothing heard for 90 s',
  missing: (ranges: readonly (readonly [number, number])[]): string => {
    const said = ranges.slice(0, 5).map(([from, to]) => (from === to ? String(from) : `${from}–${to}`));
    return `missing ${said.join(', ')}${ranges.length > said.length ? ' …' : ''}`;
  },
} as const;

export const settingsText = {
  title: 'Settings',
  family: { 'free-fall': 'Free-fall', string: 'String' },
  stopCoverage: { heard: 'Stops are heard', logged: 'Stops are logged', none: 'Stops aren’t known' },
} as const;

export const refusals: Sentences = {
  'lane.unknown': ({ lane }) => `There is no lane ${String(lane ?? '')} here.`,
  'rules.contradict': () => 'These rules contradict each other.',
  'rules.desk-before-mechanic': () => 'The desk isn’t asked before the other mechanic.',
  'rules.manager-before-desk': () => 'The manager isn’t asked before the desk.',
  'rules.lead-within-margin': () => 'Lanes are planned earlier than they are to be dressed.',
  'rules.worn-within-fresh': () => 'Worn begins above what still counts as fresh.',
  'date.invalid': () => 'This isn’t a date of the calendar.',
  'gateway.unknown': () => 'There is no such gateway here.',
  'gateway.name-taken': ({ name }) => `There is a gateway called ${String(name)} already.`,
  'gateway.two-keys': () => 'This gateway has two keys. Revoke one before you make another.',
  'gateway.key-unknown': () => 'This key is unknown or has been revoked.',
};
