import { type FormEvent, type RefObject, useState } from 'react';
import { floorWords, keyWords, keysHelp } from '#shared/text/en/floor-page.ts';
import { Mark } from '../../../ui/marks.tsx';

interface Props {
  typed: string;
  lanes: number;
  field: RefObject<HTMLInputElement | null>;
  onLane: (lane: number) => void;
  onHelp: () => void;
}

/** What the marks mean, and the field for a lane's number; while somebody types one anywhere, it is shown here. */
export function FloorKey({ typed, lanes, field, onLane, onHelp }: Props) {
  return (
    <footer className="flex shrink-0 items-center justify-between gap-x-6 pb-1">
      <Legend />
      <div className="flex shrink-0 items-center gap-3">
        <span role="status" className="type-clock text-lg">{typed === '' ? null : Number(typed) > lanes ? floorWords.noSuchLane(typed, lanes) : floorWords.typed(typed)}</span>
        <LaneField field={field} lanes={lanes} onLane={onLane} />
        <button type="button" className="type-label min-h-8 rounded-md px-2 font-[620] hover:bg-card hover:text-ink" onClick={onHelp}>
          {keysHelp.short}
        </button>
      </div>
    </footer>
  );
}

function LaneField({ field, lanes, onLane }: Pick<Props, 'field' | 'lanes' | 'onLane'>) {
  const [value, setValue] = useState('');
  const wrong = value !== '' && !(Number(value) >= 1 && Number(value) <= lanes);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    if (value === '' || wrong) return;
    field.current?.blur();
    setValue('');
    onLane(Number(value));
  };
  return (
    <form onSubmit={submit} className="flex items-center gap-2">
      {wrong ? <span role="alert" className="text-sm text-red">{floorWords.noSuchLane(value, lanes)}</span> : null}
      <input
        ref={field}
        value={value}
        aria-label={floorWords.laneNumber}
        aria-invalid={wrong || undefined}
        placeholder={floorWords.lanePlaceholder}
        inputMode="numeric"
        maxLength={2}
        onChange={(event) => setValue(event.target.value.replace(/\D/g, ''))}
        onKeyDown={(event) => (event.key === 'Escape' ? event.currentTarget.blur() : undefined)}
        className="h-8 w-16 rounded-md border border-line bg-card px-2 text-center placeholder:text-dim"
      />
    </form>
  );
}

/** The key takes one line; what doesn't fit on a narrow desk is on the keys' page (?). */
export function Legend() {
  return (
    <ul aria-label={keyWords.title} className="flex h-5 min-w-0 flex-wrap gap-x-5 overflow-hidden text-[0.78125rem] text-dim [font-stretch:92%]">
      <Entry text={keyWords.film}><span className="h-3 w-4 border-t-2 border-film-edge bg-film-2" /></Entry>
      <Entry text={keyWords.deliveries}><b className="font-[680] text-ink">{keyWords.deliveriesExample}</b></Entry>
      <Entry text={keyWords.unanswered}><Mark kind="unanswered" className="text-red" /></Entry>
      <Entry text={keyWords.answered}><Mark kind="answered" className="text-amber" /></Entry>
      <Entry text={keyWords.mechanicIn}><span className="hatch h-3 w-4" /></Entry>
      <Entry text={keyWords.out}><Mark kind="out-of-service" size={12} /></Entry>
    </ul>
  );
}

const Entry = ({ text, children }: { text: string; children: React.ReactNode }) => (
  <li className="flex items-center gap-1.5 whitespace-nowrap">
    <span aria-hidden className="contents">{children}</span>
    {text}
  </li>
);
