import { Decimal } from 'decimal.js';
import { RECEPTACLE_SHARE_OF_BREAKER } from '../presets/defaults.ts';
import type { Row } from '../rows/index.ts';

export interface ImportOptions {
  /** Judge a receptacle circuit at 80 % of its breaker; what the sheet states counts upstream. */
  receptaclesAtBreaker: boolean;
  /** Spread the load of lighting rows along their run. */
  spreadLighting: boolean;
  /** Rows of the sheet (from 1) that the person leaves out. */
  skipRows: readonly number[];
}
export const IMPORT_OPTIONS: ImportOptions = {
  receptaclesAtBreaker: true,
  spreadLighting: true,
  skipRows: [],
};

/** Starting defaults as an import applies them, counting where it did. */
export class ImportDefaults {
  readonly spreadLighting: boolean;
  receptacles = 0;
  private readonly atBreaker: boolean;

  constructor(options: ImportOptions) {
    this.spreadLighting = options.spreadLighting;
    this.atBreaker = options.receptaclesAtBreaker;
  }

  receptacle(load: Partial<Row<'load'>>, amps: string | null, poles: number): void {
    if (!this.atBreaker || amps === null || poles !== 1 || !(load.size ?? '').match(/^$| k?VA$/)) return;
    const stated = load.size ? load.size.split(' ') : null;
    if (stated && load.demandVa === undefined && load.demand === undefined)
      load.demandVa = stated[1] === 'kVA' ? new Decimal(stated[0]!).times(1000).toFixed() : stated[0]!;
    load.size = `${new Decimal(amps).times(RECEPTACLE_SHARE_OF_BREAKER).toFixed()} A`;
    load.sizeAssumed = true;
    this.receptacles++;
  }
}
