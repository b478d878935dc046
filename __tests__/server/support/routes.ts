import type { Express } from 'express';

interface Layer {
  route?: { path: string; methods: Record<string, boolean> };
  handle?: { stack?: Layer[] };
}

/** `GET /api/…` of every API route the application answers, found by walking its routers. */
export function routesOf(app: Express): string[] {
  const found: string[] = [];
  const walk = (layers: Layer[]) => {
    for (const { route, handle } of layers) {
      if (route?.path.startsWith('/api')) {
        for (const method of Object.keys(route.methods)) found.push(`${method.toUpperCase()} ${route.path}`);
      }
      if (handle?.stack) walk(handle.stack);
    }
  };
  walk(app.router.stack as unknown as Layer[]);
  return found.sort();
}
