/** A dashed box that says what is missing. */
export function MissingBox({ what }: { what: string }) {
  return (
    <span className="inline-block border border-dashed border-copper px-2 text-center text-label leading-[18px] text-copper">
      {what}
      <span className="sr-only"> is missing</span>
    </span>
  );
}
