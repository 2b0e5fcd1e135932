import type { ChangeFinding, DriftFinding, LaneFinding, TrendFinding } from '#shared/domain/numbers/findings.ts';
import type { PartFinding, RateFinding, WaitFinding } from '#shared/domain/numbers/findings-of-service.ts';

const whole = new Intl.NumberFormat('en-US', { maximumFractionDigits: 0 });
const twoDigits = new Intl.NumberFormat('en-US', { maximumSignificantDigits: 2 });
const oneDecimal = new Intl.NumberFormat('en-US', { minimumFractionDigits: 1, maximumFractionDigits: 1 });

const percent = (share: number): string => `${whole.format(100 * share)} %`;
const plural = (n: number, word: string): string => `${whole.format(n)} ${word}${n === 1 ? '' : 's'}`;

/** "lane 9", "lanes 9 and 14", "lanes 3, 9 and 14". */
export function laneList(lanes: readonly number[]): string {
  if (lanes.length === 1) return `lane ${lanes[0]}`;
  return `lanes ${lanes.slice(0, -1).join(', ')} and ${lanes[lanes.length - 1]}`;
}

const sentenceCase = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** A number expected by chance: "fewer than 1", "about 1", "about 3". */
const about = (n: number): string => (n < 0.75 ? 'fewer than 1' : `about ${whole.format(n)}`);

export function laneWords(finding: LaneFinding): string {
  switch (finding.code) {
    case 'lanes.no-frames':
      return 'No frames with stop coverage yet, so nothing can be said about single lanes.';
    case 'lanes.no-stops':
      return 'No machine stops in these frames. No lane stands out.';
    case 'lanes.watch': {
      const rest = finding.lanes.length === finding.of ? '' : ' The rest looks like chance.';
      return `Watch ${laneList(finding.lanes)}.${rest}`;
    }
    case 'lanes.uneven':
      return `${sentenceCase(plural(finding.lanes.length, 'lane'))} of ${finding.of} stand out: the lanes differ as a whole. Look for what they have in common before blaming one.`;
    case 'lanes.high-by-chance':
      return `No lane stands out. ${sentenceCase(laneList(finding.lanes))} ${finding.lanes.length === 1 ? 'is' : 'are'} a little high, but ${about(finding.byChance)} of ${finding.of} would be by chance alone.`;
    case 'lanes.several-high':
      return `${sentenceCase(laneList(finding.lanes))} ${finding.lanes.length === 1 ? 'is' : 'are'} a little high: chance alone would bring ${about(finding.byChance)} of ${finding.of}. None is far out; look again with more frames.`;
    case 'lanes.alike':
      return `All ${finding.of} lanes lie within what chance allows. No lane is shown to be worse.`;
  }
}

/** Range of a change against before: "between 55 % fewer and 12 % fewer". */
function changeRange(low: number, high: number | null): string {
  const side = (ratio: number): string => {
    const points = Math.round(100 * Math.abs(1 - ratio));
    return points === 0 ? 'no change' : `${whole.format(points)} % ${ratio < 1 ? 'fewer' : 'more'}`;
  };
  return high === null ? `at the least ${side(low)}` : `between ${side(low)} and ${side(high)}`;
}

export function changeWords(finding: ChangeFinding): string {
  switch (finding.code) {
    case 'change.no-frames':
      return 'No frames on one side of the change, so there is nothing to compare.';
    case 'change.no-stops':
      return 'No machine stops on either side of the change, so there is nothing to compare.';
    case 'change.fewer':
      return `Fewer stops per frame since the change: ${changeRange(finding.low, finding.high)}. That the change caused it isn’t shown by this alone.`;
    case 'change.more':
      return `More stops per frame since the change: ${changeRange(finding.low, finding.high)}. That the change caused it isn’t shown by this alone.`;
    case 'change.not-shown':
      return `Not shown yet: the difference could be chance (${changeRange(finding.low, finding.high)}). ${moreFrames(finding.still)}`;
  }
}

function moreFrames(still: number | null): string {
  if (still === null) return 'There were too few stops before the change for more frames to settle it.';
  if (still === 0) return 'There were frames enough to find the change that was looked for, so it is probably smaller than that.';
  return `About ${twoDigits.format(still)} more frames would probably settle it.`;
}

export function trendWords(finding: TrendFinding): string {
  switch (finding.code) {
    case 'trend.too-few':
      return 'Too few stops to see a trend.';
    case 'trend.improving':
      return 'Stops are getting rarer; chance alone would seldom look like this.';
    case 'trend.worsening':
      return 'Stops are getting more frequent; chance alone would seldom look like this.';
    case 'trend.steady':
      return 'No trend is shown. A slow one could still be hidden.';
  }
}

/** @param period what one point of the chart covers, such as "week". */
export function driftWords(finding: DriftFinding, period: string): string {
  switch (finding.code) {
    case 'drift.no-data':
      return 'Nothing to see a drift in yet.';
    case 'drift.none':
      return 'No drift is shown.';
    case 'drift.up':
      return `Drifting up: above what chance allows for ${plural(finding.periods, period)}.`;
    case 'drift.down':
      return `Drifting down: below what chance allows for ${plural(finding.periods, period)}.`;
  }
}

export function rateWords(finding: RateFinding): string {
  switch (finding.code) {
    case 'rate.no-frames':
      return 'No frames with stop coverage: no rate.';
    case 'rate.mixed':
      return 'These frames were counted in different ways, so they have no common rate.';
    case 'rate.none':
      return `No stop in ${whole.format(finding.frames)} frames: the true rate is probably below ${oneDecimal.format(finding.atMost)} per thousand.`;
    case 'rate.value':
      return `${oneDecimal.format(finding.rate)} stops per thousand frames (${percent(finding.level)} interval ${oneDecimal.format(finding.low)} to ${oneDecimal.format(finding.high)}).`;
  }
}

/** @param unit plural of what the lives are counted in, such as "frames". */
export function partWords(finding: PartFinding, unit: string): string {
  switch (finding.code) {
    case 'part.too-few':
      return `${sentenceCase(plural(finding.failures, 'failure'))} so far: too few to advise an age.`;
    case 'part.no-wear-shown':
      return 'These failures don’t show wear. Replacing a part that works may gain nothing.';
    case 'part.run-to-failure':
      return 'At these costs, running to failure is about as cheap as any age.';
    case 'part.replace-at':
      return `Replacing at about ${twoDigits.format(finding.age)} ${unit} is estimated to cost ${percent(finding.saving)} less than running to failure.`;
  }
}

export function waitWords(finding: WaitFinding): string {
  const mechanics = plural(finding.mechanics, 'mechanic');
  if (finding.code === 'wait.overloaded') return `More calls than ${mechanics} can answer: the wait would grow all evening.`;
  if (finding.code === 'wait.missed' && percent(finding.share) === percent(finding.wanted)) {
    return `${mechanics}: just under the ${percent(finding.wanted)} of calls answered within ${plural(finding.minutes, 'minute')} that are wanted.`;
  }
  const within = `${mechanics}: about ${percent(finding.share)} of calls answered within ${plural(finding.minutes, 'minute')}`;
  return finding.code === 'wait.met' ? `${within}, as wanted.` : `${within}, less than the ${percent(finding.wanted)} wanted.`;
}
