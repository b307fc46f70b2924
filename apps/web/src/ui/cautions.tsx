/** The cautions, wherever a verdict stands. */
export function Cautions({
  texts,
  firmWording,
  brief = false,
}: {
  texts: readonly string[];
  firmWording?: string;
  brief?: boolean;
}) {
  if (brief) return <p className="text-label text-ink-soft">{texts.join(' ')}</p>;
  return (
    <section aria-label="Cautions" className="max-w-200 text-label text-ink-soft">
      {texts.map((text) => (
        <p key={text} className="mb-1">
          {text}
        </p>
      ))}
      {firmWording && <p className="mt-2 whitespace-pre-line">{firmWording}</p>}
    </section>
  );
}
