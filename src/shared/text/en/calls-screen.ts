import type { SafetyKind } from '../../domain/equipment.ts';
import { listed, plural } from './formats.ts';

/** The finding of the list of calls. */
export function callsTitle(open: { status: string; safety: string | null; alarmAt: number | null; lane: number }[]): string {
  const alarm = open.find((call) => call.alarmAt !== null);
  if (alarm) return `Lane ${alarm.lane} moved with a mechanic recorded in it.`;
  const danger = open.filter((call) => call.safety);
  if (danger.length > 0) return `Danger on ${listed([...new Set(danger.map((call) => `lane ${call.lane}`))])}.`;
  const waiting = open.filter((call) => call.status === 'unanswered');
  if (waiting.length === 1) return `Lane ${waiting[0]?.lane} waits for a mechanic.`;
  if (waiting.length > 1) return `${waiting.length} calls wait for a mechanic.`;
  return open.length === 0 ? 'No call is open.' : `${plural(open.length, 'call')} open, all answered.`;
}

export const callsText = {
  open: 'Open calls',
  closedToday: 'Back running today',
  noneClosed: 'No call has been closed this business day.',
  noneOpen: 'Nothing stands.',
  noneOpenMore: 'A call appears here the moment a machine stops, a bowler asks, or somebody raises one.',
  loading: 'Calls are being fetched',
  failed: 'The calls could not be fetched.',
  retry: 'Try again',
  raise: 'Raise a call',
  raiseLead: 'The lane, then what it is. The second tap raises it.',
  lane: 'Lane',
  what: (lane: number | null) => (lane === null ? 'Choose a lane first' : `What is it on lane ${lane}?`),
  dangers: 'Danger: stops both lanes now',
  otherEquipment: 'Something else',
  said: 'What was said (may stay empty)',
  raised: (what: string, lanes: string) => `${what}, ${lanes}: raised.`,
  joined: (what: string, lanes: string) => `${what}, ${lanes}: joined the open call.`,
  mine: 'Mine',
  mineOf: (lanes: string) => `Mine: ${lanes}`,
  since: 'since raised',
  you: 'you',
  statusBy: (status: string, who: string | null) => (who ? `${who}, ${status}` : status),
  youAre: (status: string) => ({ 'acknowledged': 'you are on the way', 'on-lane': 'you are on lane', 'parked': 'you parked it' })[status] ?? status,
  parkedTill: (time: string) => `parked till ${time}`,
  runsAgain: 'runs again, wants its cause',
  mechanicIn: (who: string, time: string) => `${who} in machine, recorded ${time}`,
  escalated: { 'other-mechanic': 'other mechanic asked', 'desk': 'desk asked', 'manager': 'manager asked', 'none': '' },
  raisedBy: (who: string | null, origin: string, time: string) => `${{ stop: 'stopped', fault: 'fault', bowler: 'a bowler asked', desk: 'raised by the desk', mechanic: 'raised by a mechanic' }[origin] ?? origin}${who && (origin === 'desk' || origin === 'mechanic') ? `, ${who},` : ''} ${time}`,
  joinedTimes: (times: number) => `reported ${plural(times + 1, 'time')}`,
  closedLine: (cause: string | null, by: string | null) => [cause ?? 'no cause said', by].filter(Boolean).join(' · '),
  stood: (span: string) => `stood ${span}`,
} as const;

export const callText = {
  back: 'All calls',
  unknown: 'This call is not here.',
  unknownMore: 'It may belong to another centre, or the link is old.',
  loading: 'The call is being fetched',
  retry: 'Try again',
  failed: 'The call could not be fetched.',
  stopsIn: 'Stops in the last 200 frames',
  stopsUnheard: 'no frames heard',
  lastHere: 'Last time here',
  never: 'nothing on record',
  meanwhile: 'Meanwhile',
  waitsToo: (lane: number) => `lane ${lane} waits too`,
  bowlsOn: (lane: number) => `lane ${lane} is not held`,
  nobodyWaits: 'nobody waits on this lane',
  history: 'This lane before',
  life: 'What was done',
  onLane: 'On lane',
  backRunning: 'Back running',
  dangerGone: 'Danger removed',
  outOfService: 'Out of service',
  backInService: 'Back in service',
  park: 'Park',
  unpark: 'Take it up again',
  takenOver: 'Take over',
  takeOver: (who: string) => `Take over from ${who}`,
  endRecord: 'End the lockout record',
  firstRelease: 'Finish the release steps first',
  recordOpen: 'The lockout record is open: its release steps come first',
  firstReleaseOf: (who: string) => `${who} has a lockout record open`,
  closed: (cause: string | null, by: string | null, time: string) => `Closed ${time}${by ? ` by ${by}` : ''}: ${cause ?? 'no cause said'}.`,
  queued: (what: string) => `Queued: ${what}`,
  queuedMore: 'Not sent yet: the server is not reached. It is sent by itself, once, when the phone is back.',
  sending: 'Sending',
  notDone: (what: string, why: string) => `Not done: ${what}. ${why}`,
  understood: 'Understood',
} as const;

export const causeText = {
  title: 'What was it?',
  titleDanger: 'How was it removed?',
  lead: (lanes: string) => `Then ${lanes} is back running.`,
  often: 'Most often here',
  areas: 'Where',
  faults: (area: string) => `${area}: what`,
  otherArea: 'Another area',
  allAreas: 'Everything else',
  note: 'Note: what you did, part, position (may stay empty)',
  pinDamage: 'Metal has met pins. Inspect all pins in this machine before the next league.',
  lockout: 'Mending this means reaching in. No lockout record was kept with this call.',
  confirm: (lanes: string) => `Back running: ${lanes}`,
  confirmService: (lanes: string) => `Back in service: ${lanes}`,
  confirmDanger: 'Danger removed',
  withoutCause: 'Without a cause',
  chosen: 'Cause',
  change: 'Change',
} as const;

export const serviceText = {
  title: (lanes: string) => `Take ${lanes} out of service?`,
  lead: 'Nobody can be put there until it is back. Say why in a few words.',
  reason: 'Reason',
  reasons: ['Part missing', 'Needs two people', 'Needs an electrician', 'Not safe to run'],
  confirm: 'Out of service',
  parkTitle: 'Park this call',
  parkLead: 'It asks again when the time is over.',
  parkReasons: ['After this game', 'Waiting for a part', 'Another call first'],
  till: 'Till',
  inMinutes: (minutes: number, time: string) => (minutes < 60 ? `${minutes} min, ${time}` : `${minutes / 60} h, ${time}`),
  parkConfirm: 'Park',
} as const;

export const lockoutText = {
  title: 'Reaching in?',
  phases: 'stop · isolate · lock · release · try',
  record: 'This list is a record. It isolates nothing.',
  procedure: 'Follow the employer’s lockout procedure and the maker’s manual.',
  begin: 'Begin the lockout record',
  drop: 'Not reaching in after all',
  inside: (who: string, time: string) => `${who} in machine, recorded ${time}`,
  before: 'Before reaching in',
  release: 'Before it runs again',
  releasePhases: 'tools · guards · people · told · lock',
  own: (who: string) => `${who}’s record. Only ${who} fills it in.`,
  ended: (time: string) => `Record ended ${time}`,
  leftBehind: 'The lock was left behind',
  leftTitle: 'A lock was left behind',
  leftLead: 'Only by the centre’s written procedure. Say how it was followed: who was reached, who checked the machine, who took the lock off.',
  leftReason: 'How the procedure was followed',
  leftConfirm: 'End the record',
  alarmTitle: (lane: number) => `Lane ${lane} moved`,
  alarm: (lane: number, time: string) => `Lane ${lane} counted, was switched on or opened at ${time}, with you recorded in the machine. Get clear of it now.`,
  alarmOther: (lane: number, who: string, time: string) => `Lane ${lane} counted, was switched on or opened at ${time}, with ${who} recorded in the machine. Go and look.`,
  alarmSeen: 'I am clear of the machine',
  alarmSeenOther: 'Seen',
} as const;

/** Cautions that belong to a kind of call. */
export const cautions = {
  danger: {
    'wet-approach': 'Stop both lanes, dry the approach, and try it with a clean cloth. A trace of oil there can injure.',
    'ball-on-lane': 'Machine off first. Never walk the lane.',
    'person-in-pit': 'Machine off at the isolator, both lanes. Nobody rolls.',
    'smoke': 'Power off, clear the lanes, follow the house’s fire procedure.',
    'other-danger': 'Stop both lanes until it is gone.',
  } satisfies Record<SafetyKind, string>,
  stuckBall: 'Stuck ball: never walk the lane. Machine off first.',
  lift: 'The ball lift has its own supply. Balls still come from the neighbour lane.',
  product: 'Conditioner and cleaner: gloves, eye protection, safety data sheet. Keep them off the approach.',
  power: ['Look that nobody is in a machine.', 'Machines on one after another, not all at once.', 'Sweep each lane clear before it is opened.', 'Scoring and foul units checked.', 'Lane machine where it stopped: clean and redo that lane.'],
  powerTitle: 'After a power dip',
} as const;

export const alertText = {
  title: 'Hear of a new call',
  on: 'Turn on sound and notices',
  off: 'Turn sound off',
  isOn: 'Sound is on in this window.',
  noticesOn: 'Notices are on.',
  noticesDenied: 'Notices are blocked in this browser’s settings for this address.',
  noticesPlain: 'Notices need an https address. Over plain http there is sound only, while this page is open.',
  noticesNone: 'This browser has no notices: sound only, while this page is open.',
  soundNone: 'This browser can make no sound here.',
  newCall: (what: string, lanes: string) => `${what}, ${lanes}`,
  still: (what: string, lanes: string, minutes: number) => `Still unanswered after ${minutes} min: ${what}, ${lanes}`,
} as const;
