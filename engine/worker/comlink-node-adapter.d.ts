// comlink ships this module's types under a name that bundler resolution does not find.
declare module 'comlink/dist/esm/node-adapter.mjs' {
  import type { Endpoint } from 'comlink';
  type NodePort = {
    postMessage(message: unknown, transfer?: readonly unknown[]): void;
    on(...typeAndListener: never): unknown;
    off(...typeAndListener: never): unknown;
  };
  export default function nodeEndpoint(port: NodePort): Endpoint;
}
