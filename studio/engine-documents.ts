import { readFileSync } from 'node:fs';
import type { Plugin } from 'vite';

/** Documents of the engine that the studio serves beside its pages, by address. */
const documents = {
  'study.schema.json': { file: '../engine/schema/study.schema.json', type: 'application/schema+json' },
  'model.md': { file: '../engine/MODEL.md', type: 'text/markdown; charset=utf-8' },
} as const;

type Name = keyof typeof documents;

const read = (name: Name) => readFileSync(new URL(documents[name].file, import.meta.url), 'utf8');

/** Puts the engine's documents into the build, and serves them while developing. */
export function engineDocuments(): Plugin {
  return {
    name: 'engine-documents',
    generateBundle() {
      for (const name of Object.keys(documents) as Name[]) {
        this.emitFile({ type: 'asset', fileName: name, source: read(name) });
      }
    },
    configureServer(server) {
      for (const name of Object.keys(documents) as Name[]) {
        server.middlewares.use(`/${name}`, (_request, response) => {
          response.setHeader('Content-Type', documents[name].type);
          response.end(read(name));
        });
      }
    },
  };
}
