/** The product's own mark: a line that falls away from the nominal to the far lug. */
export function Mark({ size = 30 }: { size?: number }) {
  return (
    <svg viewBox="0 0 32 32" width={size} height={size} aria-hidden="true" className="flex-none fill-none">
      <path d="M2 7H9.5L19.6 19.6" strokeWidth="3" strokeLinecap="square" className="stroke-ink" />
      <path d="M14.5 7H30" strokeWidth="1.2" strokeDasharray="3 2.4" className="stroke-ink" />
      <circle cx="23.4" cy="24" r="5" strokeWidth="3" className="stroke-copper" />
    </svg>
  );
}
