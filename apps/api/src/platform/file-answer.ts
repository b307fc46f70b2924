/** A file as the answer of a route. */
export interface FileAnswer {
  type: string;
  name: string;
  bytes: Buffer;
  /** Shown in the browser and not saved; only for types that cannot run script. */
  inline?: boolean;
  headers?: Record<string, string>;
}
