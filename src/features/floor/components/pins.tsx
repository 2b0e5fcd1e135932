import { memo } from 'react';

/** Pins of a rack as a bowler sees them from above: head pin nearest the foul line. [number, across, back] on a 40 × 34 field. */
const SPOTS: readonly (readonly [pin: number, across: number, back: number])[] = [
  [7, 6.5, 5], [8, 15.5, 5], [9, 24.5, 5], [10, 33.5, 5], [4, 11, 13], [5, 20, 13], [6, 29, 13], [2, 15.5, 21], [3, 24.5, 21], [1, 20, 29],
];

/** Standing pins filled, fallen ones as rings; `standing` null: the machine doesn't tell, the full rack is drawn. */
export const Pins = memo(function Pins({ standing, turned = false }: { standing: readonly number[] | null; turned?: boolean }) {
  return (
    <svg aria-hidden viewBox={turned ? '0 0 34 40' : '0 0 40 34'} width="100%" height="100%" preserveAspectRatio="xMidYMid meet">
      {SPOTS.map(([pin, across, back]) => (
        <circle key={pin} className={standing && !standing.includes(pin) ? 'pin-gone' : 'pin'} cx={turned ? 34 - back : across} cy={turned ? across : back} r={2.6} />
      ))}
    </svg>
  );
});
