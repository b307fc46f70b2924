import { randomUUID } from 'node:crypto';
import { mkdir, readdir, readFile, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { type ParsedMail, simpleParser } from 'mailparser';

const FILE = /^(\d{13}-[0-9a-f-]{36})\.eml$/;
const ID = /^\d{13}-[0-9a-f-]{36}$/;

export interface StoredMail {
  id: string;
  mail: ParsedMail;
}

/** Messages as files, one each, named so that the order of names is the order of arrival. */
export class MailStore {
  private readonly directory: string;

  constructor(directory: string) {
    this.directory = directory;
  }

  async keep(message: Buffer, at: Date): Promise<string> {
    await mkdir(this.directory, { recursive: true });
    const id = `${String(at.getTime()).padStart(13, '0')}-${randomUUID()}`;
    const half = path.join(this.directory, `${id}.part`);
    await writeFile(half, message);
    await rename(half, this.file(id));
    return id;
  }

  /** Newest first, at most `count`. */
  async newest(count: number): Promise<StoredMail[]> {
    const names = await readdir(this.directory).catch(() => []);
    const ids = names
      .flatMap((name) => FILE.exec(name)?.[1] ?? [])
      .sort()
      .reverse();
    return Promise.all(ids.slice(0, count).map(async (id) => ({ id, mail: await this.parse(id) })));
  }

  async read(id: string): Promise<StoredMail | null> {
    if (!ID.test(id)) return null;
    try {
      return { id, mail: await this.parse(id) };
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
      throw error;
    }
  }

  private async parse(id: string): Promise<ParsedMail> {
    return simpleParser(await readFile(this.file(id)), { skipTextToHtml: true, skipImageLinks: true });
  }

  private file(id: string): string {
    return path.join(this.directory, `${id}.eml`);
  }
}
