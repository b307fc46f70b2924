/** The answer where there is nothing more to say. */
export const DONE = { ok: true } as const;
export type Done = typeof DONE;
