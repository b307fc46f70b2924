import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { describe, expect, it } from 'vitest';
import { sampleRevision } from '../../test/sample-revision.ts';
import { renderReport } from './render-report.tsx';

interface Printed {
  text: string;
  /** Where its outermost text ends. */
  right: number;
  width: number;
  height: number;
}

/** The text of every page, as another program reads it. */
async function pagesOf(bytes: Buffer): Promise<Printed[]> {
  const document = await getDocument({ data: new Uint8Array(bytes), verbosity: 0 }).promise;
  const pages = [];
  for (let number = 1; number <= document.numPages; number += 1) {
    const page = await document.getPage(number);
    const { items } = await page.getTextContent();
    const [, , width = 0, height = 0] = page.view;
    const texts = items.flatMap((item) => ('str' in item && item.str.trim() !== '' ? [item] : []));
    pages.push({
      text: texts.map(({ str }) => str).join(' '),
      right: Math.max(...texts.map((item) => Number(item.transform[4]) + item.width)),
      width,
      height,
    });
  }
  await document.destroy();
  return pages;
}

describe('the printed report', () => {
  it('says what it stands on, what it found and how it was worked out, on Letter', async () => {
    const { input, facts } = sampleRevision('ridge-cabin', 'letter');
    const { bytes, pages } = await renderReport(input, facts);
    const read = await pagesOf(bytes);
    expect(read.length).toBe(pages);
    for (const [i, { text, width, height }] of read.entries()) {
      expect([width, height]).toEqual([612, 792]);
      says(text, `${i + 1} of ${pages}`);
      says(text, facts.sha256.slice(0, 8));
      says(text, 'Tannery Row Electric');
    }
    const all = read.map(({ text }) => text).join('\n');
    for (const run of input.job.runs) says(all, run.id);
    for (const notice of input.notices) says(plain(all), plain(notice));
    says(all, input.firmWording);
    expect(all).toMatch(/2\s*·\s*I\s*·\s*R\s*·\s*L/);
    says(all, 'Node equations at');
    says(all, 'Decision on revision C');
    says(all, facts.sha256);
  }, 60_000);

  it('prints the same on A4, in metres and mm²', async () => {
    const { input, facts } = sampleRevision('weaving-hall', 'a4');
    const read = await pagesOf((await renderReport(input, facts)).bytes);
    expect([Math.round(read[0]!.width), Math.round(read[0]!.height)]).toEqual([595, 842]);
    const all = read.map(({ text }) => text).join('\n');
    says(all, 'mm²');
    says(all, 'ρ1');
    for (const panel of input.job.panels) says(all, panel.bus);
  }, 60_000);

  it('prints each figure that exceeds with its limit, and every other reason in words', async () => {
    const { input, facts } = sampleRevision('ridge-cabin');
    const limits = { ...input.job.limits, branch: 3, total: 4, lowestVolts: 47.9 };
    const { bytes } = await renderReport({ ...input, job: { ...input.job, limits } }, facts);
    const [first] = await pagesOf(bytes);
    expect(first?.text).toMatch(/3\.02\s*\*\s+4\.98\s*\*\s+3, 4/);
    expect(first?.text).toMatch(/lowest volts 47\.\d+ V\s+< 47\.9 V/);
  }, 60_000);

  it('keeps long names inside their places', async () => {
    const { input, facts } = sampleRevision('ridge-cabin');
    const long = 'Ridge cabin, shed and well house of the upper pasture, second phase of the works';
    const titleBlock = { ...input.titleBlock, job: long, authority: long, codeEdition: long };
    const read = await pagesOf((await renderReport({ ...input, titleBlock }, facts)).bytes);
    for (const { text, right, width } of read) {
      expect(right).toBeLessThan(width - 29);
      says(text, '…');
    }
    says(read[0]!.text.replace(/\s+/g, ' '), long);
  }, 60_000);

  it('prints the reason beside a size below the ampacity floor, and marks what was assumed', async () => {
    const { input, facts } = sampleRevision('ridge-cabin');
    const run = input.job.panels.flatMap((panel) => panel.circuits).find((circuit) => circuit.run !== null)!
      .run!;
    const { bytes } = await renderReport(
      {
        ...input,
        overrides: [{ run, reason: 'Existing run, load limited by a relay.' }],
        assumed: [{ kind: 'run', id: run, field: 'length', text: '12 m: nobody measured it' }],
      },
      facts,
    );
    const all = (await pagesOf(bytes)).map(({ text }) => text).join('\n');
    says(all, 'Existing run, load limited by a relay.');
    says(all, 'below the ampacity floor by decision');
    expect(all).toContain('1 length; each is marked a where it is printed');
  }, 60_000);
});

/** Short when it fails: a page of text is no message. */
const says = (text: string, part: string) => expect(text.includes(part), part).toBe(true);
const plain = (text: string): string => text.replace(/\s+/g, '');
