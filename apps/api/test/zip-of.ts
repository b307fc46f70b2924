import { crc32, deflateRawSync } from 'node:zlib';

export interface ZipEntry {
  name: string;
  bytes: Buffer;
  /** What the table of contents says, where it should lie. */
  declaredSize?: number;
  packed?: Buffer;
  encrypted?: boolean;
}

/** A zip archive by hand (PKWARE APPNOTE 6.3, sections 4.3.7 to 4.3.16), so that it can also be a wrong one. */
export function zipOf(entries: readonly ZipEntry[]): Buffer {
  const locals: Buffer[] = [];
  const centrals: Buffer[] = [];
  let offset = 0;
  for (const entry of entries) {
    const name = Buffer.from(entry.name);
    const packed = entry.packed ?? deflateRawSync(entry.bytes);
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt16LE(entry.encrypted ? 1 : 0, 2);
    common.writeUInt16LE(8, 4);
    common.writeUInt32LE(crc32(entry.bytes), 10);
    common.writeUInt32LE(packed.length, 14);
    common.writeUInt32LE(entry.declaredSize ?? entry.bytes.length, 18);
    common.writeUInt16LE(name.length, 22);
    const local = Buffer.concat([signature(0x04034b50), common, name, packed]);
    const place = Buffer.alloc(14);
    place.writeUInt32LE(offset, 10);
    centrals.push(Buffer.concat([signature(0x02014b50), Buffer.from([20, 0]), common, place, name]));
    locals.push(local);
    offset += local.length;
  }
  const directory = Buffer.concat(centrals);
  const end = Buffer.alloc(18);
  end.writeUInt16LE(entries.length, 4);
  end.writeUInt16LE(entries.length, 6);
  end.writeUInt32LE(directory.length, 8);
  end.writeUInt32LE(offset, 12);
  return Buffer.concat([...locals, directory, signature(0x06054b50), end]);
}

function signature(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32LE(value);
  return bytes;
}
