const { getDefaultConfig } = require('expo/metro-config');
const http = require('node:http');
const path = require('node:path');

const config = getDefaultConfig(__dirname);

config.resolver.assetExts.push('woff2', 'woff', 'wasm', 'glb');

// Folders of this project that the bundler must neither crawl nor watch. Anchored at the root, so that packages
// which have a folder of the same name are left alone.
const blocked = ['.data', 'dist', 'dist-server', 'server', 'test-results'].map(
  (folder) => new RegExp(`^${path.join(__dirname, folder).replace(/[.*+?^${}()|[\]\\]/g, '\\$&')}(/.*)?$`),
);
config.resolver.blockList = [...[config.resolver.blockList ?? []].flat(), ...blocked];

// zod re-exports its messages in fifty languages. The bundler keeps whatever is re-exported, 340 kB that the first
// page would load and nobody reads, so its list of languages becomes the one that zod itself starts with.
const ZOD_LANGUAGES = /[\\/]zod[\\/]v4[\\/]locales[\\/]index\.(js|cjs)$/;
config.resolver.resolveRequest = (context, name, platform) => {
  const found = context.resolveRequest(context, name, platform);
  return found.type === 'sourceFile' && ZOD_LANGUAGES.test(found.filePath)
    ? { ...found, filePath: found.filePath.replace(/index\.(c?js)$/, 'en.$1') }
    : found;
};

// In development the API runs on its own port; the bundler's server passes /api on and sets the isolation headers
// that the production server sets.
const api = new URL(process.env.LOLLOP_API ?? 'http://127.0.0.1:4050');
config.server.enhanceMiddleware = (metro) => (request, response, next) => {
  response.setHeader('Cross-Origin-Opener-Policy', 'same-origin');
  response.setHeader('Cross-Origin-Embedder-Policy', 'require-corp');
  if (!request.url?.startsWith('/api/')) return metro(request, response, next);
  const forward = http.request(
    { host: api.hostname, port: api.port, path: request.url, method: request.method, headers: request.headers },
    (answer) => {
      response.writeHead(answer.statusCode ?? 502, answer.headers);
      answer.pipe(response);
    },
  );
  forward.on('error', () => {
    response.writeHead(502);
    response.end();
  });
  request.pipe(forward);
};

module.exports = config;
