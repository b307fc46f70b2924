import { addScaled, dot, size } from './vectors.ts';

/** So many steps are looked back upon. */
const DEPTH = 3;
/** A step that leaves less than this share of itself beside the others says nothing new. */
const NEW = 1e-8;

/**
 * Speeds up x ↦ g(x): the next x is g(x) less the combination of the last steps that cancels most of g(x) − x
 * (Anderson 1965), one round for about two plain ones.
 */
export class Mixer {
  private readonly steps: { f: Float64Array; g: Float64Array }[] = [];
  private lastX: Float64Array | null = null;
  private lastF: Float64Array | null = null;

  /** Puts the next x in place of x; `f` is g(x) − x. `plain`: g(x) itself. */
  advance(x: Float64Array, f: Float64Array, plain: boolean): void {
    if (this.lastX && this.lastF) {
      const step = { f: f.slice(), g: f.slice() };
      addScaled(step.f, -1, this.lastF);
      addScaled(step.g, 1, x);
      addScaled(step.g, -1, this.lastX);
      addScaled(step.g, -1, this.lastF);
      this.steps.unshift(step);
      if (this.steps.length > DEPTH) this.steps.pop();
    }
    this.lastX = x.slice();
    this.lastF = f.slice();
    addScaled(x, 1, f);
    if (!plain) this.cancel(x, f);
  }

  /** Takes out of x what the steps, made orthogonal one after the other, cancel of f. */
  private cancel(x: Float64Array, f: Float64Array): void {
    const used: { f: Float64Array; g: Float64Array }[] = [];
    for (const step of this.steps) {
      const part = { f: step.f.slice(), g: step.g.slice() };
      const whole = size(part.f);
      for (const before of used) {
        const share = dot(part.f, before.f);
        addScaled(part.f, -share, before.f);
        addScaled(part.g, -share, before.g);
      }
      const left = size(part.f);
      if (!(left > NEW * whole)) continue;
      for (let i = 0; i < x.length; i++) {
        part.f[i]! /= left;
        part.g[i]! /= left;
      }
      used.push(part);
      addScaled(x, -dot(f, part.f), part.g);
    }
  }
}
