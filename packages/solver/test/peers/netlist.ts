import type { Circuit, Pair } from './circuit.ts';

const name = (node: number): string => (node < 0 ? '0' : `n${node}`);
const text = (value: number): string => value.toExponential(17);

/** Magnitude and phase in degrees, as the program's sources take them. */
const phasor = ([re, im]: Pair): string =>
  `AC ${text(Math.hypot(re, im))} ${text((Math.atan2(im, re) * 180) / Math.PI)}`;

/**
 * The circuit as an ngspice deck: one alternating analysis at its frequency (direct current: at 1 Hz, where nothing
 * has a reactance), all node volts as an ASCII raw file. Elements over more than two nodes are sums of their volts
 * by controlled sources, an impedance, and currents back into the nodes.
 */
export function netlistOf(circuit: Circuit, rawFile: string): string {
  const hertz = circuit.frequency === 0 ? 1 : circuit.frequency;
  const lines = ['farlug job at design demand'];
  for (const { node, volts } of circuit.fixed) lines.push(`V${node} ${name(node)} 0 ${phasor(volts)}`);
  for (const [e, element] of circuit.elements.entries()) lines.push(...elementLines(e, element, hertz));
  for (const [s, { a, b, amps }] of circuit.sinks.entries())
    if (amps[0] !== 0 || amps[1] !== 0) lines.push(`I${s} ${name(a)} ${name(b)} ${phasor(amps)}`);
  return `${lines.join('\n')}
.options gmin=1e-30 reltol=1e-12
.control
set filetype=ascii
set numdgt=16
ac lin 1 ${text(hertz)} ${text(hertz)}
write ${rawFile} all
quit
.endc
.end
`;
}

function elementLines(e: number, { nodes, u, z, emf }: Circuit['elements'][number], hertz: number): string[] {
  if (nodes.length === 2 && u[0] === 1 && u[1] === -1 && emf[0] === 0 && emf[1] === 0)
    return impedance(`e${e}`, name(nodes[0]!), name(nodes[1]!), z, hertz);
  // x0 = u0·V0, x1 = x0 + u1·V1, …; the meter carries i, and each node gives u·i.
  const sum = nodes.map(
    (node, k) => `E${e}_${k} x${e}_${k} ${k === 0 ? '0' : `x${e}_${k - 1}`} ${name(node)} 0 ${text(u[k]!)}`,
  );
  return [
    ...sum,
    ...impedance(`e${e}`, `x${e}_${nodes.length - 1}`, `m${e}`, z, hertz),
    `Vm${e} m${e} s${e} 0`,
    `Vs${e} s${e} 0 ${phasor(emf)}`,
    ...nodes.map((node, k) => `F${e}_${k} ${name(node)} 0 Vm${e} ${text(u[k]!)}`),
  ];
}

/** A resistance and a reactance in series; either alone where the other is nothing. */
function impedance(id: string, from: string, to: string, [r, x]: Pair, hertz: number): string[] {
  const omega = 2 * Math.PI * hertz;
  const reactance = (a: string, b: string) =>
    x > 0 ? `L${id} ${a} ${b} ${text(x / omega)}` : `C${id} ${a} ${b} ${text(-1 / (omega * x))}`;
  if (x === 0) return [`R${id} ${from} ${to} ${text(r)}`];
  if (r === 0) return [reactance(from, to)];
  return [`R${id} ${from} ${id}r ${text(r)}`, reactance(`${id}r`, to)];
}

/** Node volts out of an ASCII raw file with one complex point; nodes that the deck does not have stay undefined. */
export function readRaw(raw: string): (Pair | undefined)[] {
  const lines = raw.split('\n');
  const variables = lines.indexOf('Variables:');
  const values = lines.findIndex((line) => line.startsWith('Values:'));
  if (variables < 0 || values < 0) throw new Error('not an ASCII raw file');
  const names = lines.slice(variables + 1, values).map((line) => line.trim().split(/\s+/)[1] ?? '');
  const numbers = lines
    .slice(values + 1)
    .join(' ')
    .trim()
    .split(/\s+/)
    .slice(1)
    .map((pair) => pair.split(',').map(Number));
  const volts: (Pair | undefined)[] = [];
  for (const [i, label] of names.entries()) {
    const node = /^(?:v\()?n(\d+)\)?$/.exec(label)?.[1];
    if (node !== undefined) volts[Number(node)] = [numbers[i]![0]!, numbers[i]![1] ?? 0];
  }
  return volts;
}
