const ESCAPES: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
export const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (character) => ESCAPES[character]!);

/** Paragraphs of plain text as simple HTML; an address becomes a link that shows where it leads. */
export function letterHtml(paragraphs: readonly string[]): string {
  const body = paragraphs
    .map((text) => {
      const marked = escapeHtml(text)
        .replace(/https?:\/\/[^\s<]+/g, (url) => `<a href="${url}">${url}</a>`)
        .replaceAll('\n', '<br>');
      return `<p>${marked}</p>`;
    })
    .join('\n');
  return `<!doctype html><html><body style="font-family:sans-serif;font-size:15px;line-height:1.5;max-width:42em">\n${body}\n</body></html>`;
}
