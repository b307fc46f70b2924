/** The class names among what is given, joined: anything that is not a name is left out. */
export function cx(...names: unknown[]): string {
  return names.filter((name) => typeof name === 'string' && name !== '').join(' ');
}
