import type { Route } from '@farlug/contract/route';

type Values = Record<string, unknown>;

/** The address of a route: `:name` filled from the params, the rest of the query behind `?`. */
export function routeUrl(
  route: Pick<Route, 'name' | 'path'>,
  params: Values = {},
  query: Values = {},
): string {
  const path = route.path.replace(/:(\w+)/g, (_, name: string) => {
    const value = params[name];
    if (value === undefined || value === null) throw new Error(`${route.name}: ${name} is missing`);
    return encodeURIComponent(String(value));
  });
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query))
    if (value !== undefined && value !== null) search.set(name, String(value));
  const text = search.toString();
  return text ? `${path}?${text}` : path;
}
