// SuiteSparse (C) and SciPy beside our own kernels: built and run only where the machine has them.
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { invert, PACKED } from '../../src/linear/blocks.ts';
import type { Timing } from '../measure.ts';
import type { FourWireNetwork, RealNetwork } from '../networks/networks.ts';

export type PeerTiming = Timing & { peakMB: number };

export interface Peers {
  /** What is missing, for people; empty where everything is there. */
  missing: string[];
  cholmod: ((file: string, repeats: number) => PeerTiming) | null;
  klu: ((file: string, repeats: number) => PeerTiming) | null;
  splu: ((file: string, repeats: number) => PeerTiming) | null;
  saveReal: (net: RealNetwork) => string;
  saveFourWire: (net: FourWireNetwork) => string;
  end: () => void;
}

export function startPeers(): Peers {
  const folder = mkdtempSync(join(tmpdir(), 'farlug-bench-'));
  const binary = join(folder, 'peer');
  const source = new URL('peer.c', import.meta.url).pathname;
  const built = spawnSync('gcc', ['-O3', '-o', binary, source, '-lcholmod', '-lklu', '-lumfpack', '-lm']);
  const native = built.status === 0;
  const scipy = spawnSync('python3', ['-c', 'import scipy']).status === 0;
  const run = (file: string, args: string[]) =>
    JSON.parse(execFileSync(file, args, { encoding: 'utf8' })) as PeerTiming;
  const file = join(folder, 'network.bin');
  const save = (parts: (Int32Array | Float64Array)[]) => {
    writeFileSync(
      file,
      Buffer.concat(parts.map((part) => Buffer.from(part.buffer, part.byteOffset, part.byteLength))),
    );
    return file;
  };
  return {
    missing: [
      ...(native ? [] : ['SuiteSparse (gcc and libsuitesparse-dev)']),
      ...(scipy ? [] : ['SciPy (python3-scipy)']),
    ],
    cholmod: native ? (name, repeats) => run(binary, ['cholmod', name, String(repeats)]) : null,
    klu: native ? (name, repeats) => run(binary, ['klu', name, String(repeats)]) : null,
    splu: scipy
      ? (name, repeats) =>
          run('python3', [new URL('splu.py', import.meta.url).pathname, name, String(repeats)])
      : null,
    // Siemens are handed over ready: the peers' clocks need not invert.
    saveReal: ({ buses, from, to, ohms, amps }) =>
      save([Int32Array.from([1, buses, from.length, 0]), from, to, ohms.map((r) => 1 / r), amps]),
    saveFourWire: (net) => {
      const { re, im } = admittances(net);
      const head = Int32Array.from([4, net.buses, net.from.length, 0]);
      return save([head, net.from, net.to, re, im, net.ampsRe, net.ampsIm, net.shunt]);
    },
    end: () => rmSync(folder, { recursive: true }),
  };
}

function admittances({ from, zRe, zIm }: FourWireNetwork): { re: Float64Array; im: Float64Array } {
  const re = new Float64Array(zRe.length);
  const im = new Float64Array(zIm.length);
  const blockRe = new Float64Array(16);
  const blockIm = new Float64Array(16);
  for (let e = 0; e < from.length; e++) {
    for (const [k, q] of PACKED.entries()) {
      blockRe[k] = zRe[10 * e + q]!;
      blockIm[k] = zIm[10 * e + q]!;
    }
    invert(blockRe, blockIm, 0);
    for (const [k, q] of PACKED.entries()) {
      re[10 * e + q] = blockRe[k]!;
      im[10 * e + q] = blockIm[k]!;
    }
  }
  return { re, im };
}
