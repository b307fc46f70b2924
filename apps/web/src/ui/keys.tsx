/** A key, as it is printed on the keyboard. */
export function Key({ children }: { children: string }) {
  return (
    <kbd className="inline-block min-w-6 border border-line px-1 text-center font-hand text-label leading-5">
      {children}
    </kbd>
  );
}
