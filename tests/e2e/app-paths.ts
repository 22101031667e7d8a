import '@angular/compiler';
import '@angular/localize/init';
import type { Route, Routes } from '@angular/router';

/**
 * Every path with a screen, as the client's own routes declare them, lazy ones included:
 * `/reports/:number`, … and `/**` for what no route takes.
 */
export async function appPaths(): Promise<readonly string[]> {
  // Read at run time: the client's files are not compiled with the tests' settings.
  const address = new URL('../../client/src/app/app.routes.ts', import.meta.url);
  const { routes }: { routes: Routes } = await import(address.href);
  return pathsOf(routes, '');
}

async function pathsOf(routes: Routes, parent: string): Promise<string[]> {
  const paths: string[] = [];
  for (const route of routes) {
    const path = route.path ? `${parent}/${route.path}` : parent;
    const children = await childrenOf(route);
    if (children) paths.push(...await pathsOf(children, path));
    else if (route.component || route.loadComponent) paths.push(path || '/');
  }
  return paths;
}

async function childrenOf(route: Route): Promise<Routes | undefined> {
  if (route.children) return route.children;
  const loaded: unknown = await route.loadChildren?.();
  if (loaded === undefined) return undefined;
  if (!Array.isArray(loaded)) throw new Error(`${route.path}: its children are no list of routes`);
  return loaded;
}
