import { readdirSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { RouteHandler } from '@/app/api/v1/_route';

export const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
export type Method = (typeof METHODS)[number];
export type Route = { name: string; method: Method; path: string; params: string[]; handler: RouteHandler };

const folder = fileURLToPath(new URL('../../app/api/v1', import.meta.url));

const files = () =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((file) => path.basename(file) === 'route.ts')
    .sort();

const isHandler = (value: unknown): value is RouteHandler => typeof value === 'function' && 'descriptor' in value;

/** Every handler of every route file on disk: a new route is walked without anybody listing it. */
export async function allRoutes(): Promise<Route[]> {
  const routes: Route[] = [];
  for (const file of files()) {
    const where = `/${path.dirname(file)}`;
    const module: Record<string, unknown> = await import(pathToFileURL(path.join(folder, file)).href);
    for (const method of METHODS) {
      const handler = module[method];
      if (handler === undefined) continue;
      if (!isHandler(handler)) throw new Error(`${method} ${where} was not made by a wrapper of app/api/v1.`);
      const params = [...where.matchAll(/\[(\w+)\]/g)].map((match) => match[1] ?? '');
      routes.push({ name: `${method} ${where}`, method, path: where, params, handler });
    }
  }
  return routes;
}

const ORIGIN = 'http://127.0.0.1:3000';
const SAME_ORIGIN = { 'sec-fetch-site': 'same-origin' };

/** The least that reaches the verb: an empty object, or for a file route a small file. */
function bodyOf(route: Route): { body?: BodyInit; headers: Record<string, string> } {
  if (route.method === 'GET') return { headers: {} };
  if (route.path.endsWith('/uploads')) {
    const form = new FormData();
    form.set('file', new File(['sample,ph\nNorth,6.4\n'], 'matrix.csv', { type: 'text/csv' }));
    return { body: form, headers: {} };
  }
  return { body: '{}', headers: { 'content-type': 'application/json' } };
}

export function callRoute(
  route: Route,
  params: Record<string, string>,
  options: { cookie?: string | undefined; headers?: Record<string, string>; body?: BodyInit } = {},
): Promise<Response> {
  const least = bodyOf(route);
  const where = route.path.replace(/\[(\w+)\]/g, (_, name: string) => encodeURIComponent(params[name] ?? ''));
  const body = options.body ?? least.body;
  const request = new Request(`${ORIGIN}/api/v1${where}`, {
    method: route.method,
    headers: {
      ...SAME_ORIGIN,
      ...least.headers,
      ...(options.cookie ? { cookie: options.cookie } : {}),
      ...options.headers,
    },
    ...(body === undefined ? {} : { body }),
  });
  const own = Object.fromEntries(route.params.map((name) => [name, params[name] ?? '']));
  // As the framework does: a path without a parameter comes with no params at all.
  return route.handler(request, { params: Promise.resolve(route.params.length === 0 ? undefined : own) });
}
