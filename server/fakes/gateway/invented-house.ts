/** The demo's centre. Everything in it is invented. */

export const HOUSE = { slug: 'tarn-ferry', name: 'Tarn Ferry Bowl', lanes: 32, opensAt: 10 * 60, closesAt: 24 * 60 };

export const SOURCES = { backRoom: 'urn:demo:back-room', laneCare: 'urn:demo:lane-care' } as const;

export interface InventedMachine {
  code: string;
  name: string;
  products: 1 | 2;
  /** Seconds a lane with the move to the next. */
  pace: number;
  tankMl: number;
}

export const MACHINES: readonly [InventedMachine, InventedMachine] = [
  { code: 'heron', name: 'Heron, walks by itself', products: 2, pace: 104, tankMl: 1900 },
  { code: 'wren', name: 'Wren, moved by hand', products: 1, pace: 127, tankMl: 1300 },
];

export interface InventedLeague {
  key: string;
  name: string;
  /** ISO weekdays on which a league of this slot plays; the name gets the weekday's word. */
  slot: 'afternoon' | 'early' | 'trios' | 'owls' | 'late';
  start: number;
  lanes: readonly [number, number];
  teamSize: number;
  games: number;
  pattern: string;
  fresh: boolean;
  sanctioned: boolean;
}

const WORD = ['', 'Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'];

const SLOTS: readonly Omit<InventedLeague, 'key' | 'name'>[] = [
  { slot: 'afternoon', start: 13 * 60 + 30, lanes: [1, 16], teamSize: 3, games: 3, pattern: 'house', fresh: false, sanctioned: false },
  { slot: 'early', start: 19 * 60, lanes: [1, 12], teamSize: 4, games: 3, pattern: 'millrace', fresh: true, sanctioned: true },
  { slot: 'trios', start: 19 * 60 + 15, lanes: [19, 24], teamSize: 3, games: 3, pattern: 'house', fresh: false, sanctioned: false },
  { slot: 'owls', start: 20 * 60 + 15, lanes: [25, 32], teamSize: 4, games: 3, pattern: 'night-owls', fresh: true, sanctioned: true },
  { slot: 'late', start: 22 * 60 + 5, lanes: [19, 24], teamSize: 2, games: 3, pattern: 'lock-gate', fresh: true, sanctioned: false },
];

const NAMES: Record<InventedLeague['slot'], (weekday: number) => string> = {
  afternoon: (weekday) => `${['', 'Ferrymen', 'Grey Herons', 'Seniors', 'Lock Keepers', 'Early Birds'][weekday]} Afternoon`,
  early: (weekday) => `${WORD[weekday]} Scratch`,
  trios: (weekday) => `${['', 'Quayside', 'Ropewalk', 'Millhands', 'Boatyard', 'Chandlers', 'Weekend', 'Sunday'][weekday]} Trios`,
  owls: (weekday) => `${['', 'Moonrakers', 'Lamplighters', 'Night Owls', 'Night Owls', 'Firewatch', 'Harbour Mixed', 'Tideline'][weekday]}${weekday === 4 ? ' Thursday' : ''}`,
  late: (weekday) => `Late ${['', 'Doubles', 'Pairs', 'Doubles', 'Doubles', 'Shift', 'Doubles', 'Pairs'][weekday]} ${WORD[weekday]?.slice(0, 3)}`,
};

/** The leagues that play on an ISO weekday (1 = Monday). No afternoon league at weekends. */
export function leaguesOn(weekday: number): InventedLeague[] {
  return SLOTS.filter((s) => s.slot !== 'afternoon' || weekday <= 5).map((s) => ({ ...s, key: `${s.slot}-${weekday}`, name: NAMES[s.slot](weekday) }));
}

export const WARM_UP_MINUTES = 10;

/** Machine stops a thousand frames: one lane is really worse. */
export const STOPS_PER_THOUSAND = (lane: number): number => (lane === 9 ? 3.2 : 1.3);

export const STOP_TEXTS = [
  ['pin-off-spot', 'pin off spot'], ['distributor', 'distributor jam'], ['deck', 'deck did not come down'], ['turret', 'turret not full'],
  ['rake', 'rake did not lift'], ['elevator', 'pin wheel jam'], ['carpet', 'pit carpet slipped'],
] as const;

export const PARTY_LABELS = ['Ada is nine', 'Works do, Tarn Glass', 'Leavers', 'Bo’s birthday', 'Choir night out', 'Scouts', 'Year 6', 'Ruby turns 40'];

export const lanesOfRange = (from: number, to: number): number[] => Array.from({ length: to - from + 1 }, (_, i) => from + i);
