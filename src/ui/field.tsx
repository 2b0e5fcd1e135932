import { type InputHTMLAttributes, type ReactNode, type Ref, type SelectHTMLAttributes, type TextareaHTMLAttributes, useId } from 'react';
import { classes } from './class-names.ts';

/** What a control needs so that its label, hint and error belong to it. Spread it: `{(c) => <Input {...c} {...register('name')} />}`. */
export interface ControlProps {
  id: string;
  'aria-describedby': string | undefined;
  'aria-invalid': boolean | undefined;
}

/** Label above, hint under it, the message beside the control that is wrong. `hiddenLabel` only where the place says it. */
export function Field({ label, hint, error, hiddenLabel = false, className, children }: {
  label: string;
  hint?: ReactNode;
  error?: ReactNode;
  hiddenLabel?: boolean;
  className?: string;
  children: (control: ControlProps) => ReactNode;
}) {
  const id = useId();
  const described = [hint && `${id}-hint`, error && `${id}-error`].filter(Boolean).join(' ');
  return (
    <div className={classes('flex flex-col gap-1', className)}>
      <label htmlFor={id} className={hiddenLabel ? 'sr-only' : 'text-sm font-[620]'}>
        {label}
      </label>
      {hint ? (
        <span id={`${id}-hint`} className="type-label">
          {hint}
        </span>
      ) : null}
      {children({ id, 'aria-describedby': described || undefined, 'aria-invalid': error ? true : undefined })}
      <span id={`${id}-error`} role="alert" className="text-sm font-[620] text-red empty:hidden">
        {error ?? null}
      </span>
    </div>
  );
}

const box =
  'w-full min-h-9 rounded-md border border-line bg-card px-2.5 text-ink placeholder:text-dim aria-invalid:border-2 aria-invalid:border-red disabled:opacity-50 max-[900px]:min-h-hand max-[900px]:text-base';

export function Input({ className, ...rest }: InputHTMLAttributes<HTMLInputElement> & { ref?: Ref<HTMLInputElement> }) {
  return <input autoComplete="off" {...rest} className={classes(box, className)} />;
}

export function TextArea({ className, rows = 3, ...rest }: TextareaHTMLAttributes<HTMLTextAreaElement> & { ref?: Ref<HTMLTextAreaElement> }) {
  return <textarea rows={rows} {...rest} className={classes(box, 'py-2', className)} />;
}

/** The browser's own list: on a phone nothing is better. `options` are [value, text]. */
export function Select({ options, empty, className, ...rest }: SelectHTMLAttributes<HTMLSelectElement> & {
  ref?: Ref<HTMLSelectElement>;
  options: readonly (readonly [value: string, text: string])[];
  /** Text of the first, empty choice. */
  empty?: string;
}) {
  return (
    <select {...rest} className={classes(box, 'pr-8', className)}>
      {empty === undefined ? null : <option value="">{empty}</option>}
      {options.map(([value, text]) => (
        <option key={value} value={value}>
          {text}
        </option>
      ))}
    </select>
  );
}

/** A tick with its words; the whole line is the target. */
export function Tick({ label, className, ...rest }: { label: ReactNode } & InputHTMLAttributes<HTMLInputElement> & { ref?: Ref<HTMLInputElement> }) {
  return (
    <label className={classes('flex min-h-8 cursor-pointer items-center gap-2.5 max-[900px]:min-h-hand', className)}>
      <input type="checkbox" {...rest} className="size-5 shrink-0 accent-ink" />
      <span>{label}</span>
    </label>
  );
}
