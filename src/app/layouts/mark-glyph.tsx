/** The mark: a lane going away from the foul line, dressed half-way up. */
export function MarkGlyph({ size = 24 }: { size?: number }) {
  return (
    <svg aria-hidden viewBox="0 0 22 26" width={(size * 22) / 26} height={size}>
      <path d="M2 25 8 1h6l6 24z" fill="var(--pine)" />
      <path d="M4.6 25 7.1 11h7.8l2.5 14z" fill="var(--film)" />
    </svg>
  );
}
