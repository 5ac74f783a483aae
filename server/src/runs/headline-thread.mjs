// A thread of Node does not inherit the loader of its parent: this one sets it up, then runs the source.
import { register } from 'tsx/esm/api';

register();
await import('./headline-worker.ts');
