import { createRequire } from 'node:module';
import path from 'node:path';
import type { ShownVerdict } from '@farlug/solver/judge';
import { Font, StyleSheet } from '@react-pdf/renderer';

export const INK = '#1B2430';
export const SOFT = '#5A6472';
export const HAIR = '#DAD3C5';
export const LINE = '#7C838D';
export const COPPER = '#A4511F';
export const COLOURS: Record<ShownVerdict, string> = {
  over: '#A61C1C',
  rise: '#A61C1C',
  near: '#8A5A00',
  within: '#1F6B4F',
  unserved: '#A61C1C',
  unjudged: SOFT,
};

const resolve = createRequire(import.meta.url).resolve;
const file = (name: string, font: string): string =>
  path.join(path.dirname(resolve(`${name}/package.json`)), 'TTF', font);

let registered = false;
/** The type of the pages, as TrueType: it has every sign that a report prints, and is embedded once. */
export function registerFonts(): void {
  if (registered) return;
  registered = true;
  Font.register({
    family: 'Sans',
    fonts: [
      { src: file('source-sans', 'SourceSans3-Regular.ttf'), fontWeight: 400 },
      { src: file('source-sans', 'SourceSans3-Semibold.ttf'), fontWeight: 600 },
    ],
  });
  Font.register({ family: 'Code', src: file('source-code-pro', 'SourceCodePro-Regular.ttf') });
  // A word is never broken: a figure cut in two would be read as another one.
  Font.registerHyphenationCallback((word) => [word]);
}

export const styles = StyleSheet.create({
  text: { fontFamily: 'Sans', fontSize: 9, lineHeight: 1.3, color: INK },
  small: { fontSize: 8, lineHeight: 1.32 },
  soft: { color: SOFT },
  bold: { fontWeight: 600 },
  h1: { fontSize: 17, fontWeight: 600, lineHeight: 1.2 },
  h2: { fontSize: 9, fontWeight: 600, marginTop: 9, marginBottom: 3 },
  code: { fontFamily: 'Code', fontSize: 7.6, lineHeight: 1.4 },
  row: { flexDirection: 'row' },
});
