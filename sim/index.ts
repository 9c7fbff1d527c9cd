// The public surface of the simulator, and the only file of it that ui/ imports.

export { SimError } from './errors.ts';
export type { SimFault } from './errors.ts';
