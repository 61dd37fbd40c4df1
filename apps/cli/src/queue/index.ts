export { withQueue } from './connect.js';
export { computeByWorkers } from './compute-by-workers.js';
export { workOnQueue } from './work-on-queue.js';
