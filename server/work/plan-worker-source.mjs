import { register } from 'tsx/esm/api';

/* The planner's thread from source, in development and tests: Node 20 obeys --import in the main thread only. */

register();
await import('./plan-worker.ts');
