// Bundles what runs outside Next.js: the worker process and the solver's thread. npm packages stay outside the bundles.
import { fileURLToPath } from 'node:url';
import { build, type Plugin } from 'esbuild';

/** `server-only` throws wherever React's server condition is not set; in these processes everything is the server. */
const serverOnly: Plugin = {
  name: 'server-only',
  setup({ onLoad, onResolve }) {
    onResolve({ filter: /^server-only$/ }, ({ path }) => ({ path, namespace: 'empty' }));
    onLoad({ filter: /.*/, namespace: 'empty' }, () => ({ contents: '' }));
  },
};

/** Writes dist/worker.js and dist/analysis-worker.js. */
export async function buildWorkers(): Promise<void> {
  const root = fileURLToPath(new URL('..', import.meta.url));
  await build({
    absWorkingDir: root,
    entryPoints: { worker: 'scripts/worker.ts', 'analysis-worker': 'lib/analysis/hosts/node-worker.ts' },
    outdir: 'dist',
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    jsx: 'automatic',
    sourcemap: true,
    logLevel: 'warning',
    plugins: [serverOnly],
  });
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await buildWorkers();
