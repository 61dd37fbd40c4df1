import { parentPort } from 'node:worker_threads';
import { serveTasks } from '../../src/compute/serve-tasks.js';
import { TEST_TASKS } from './test-tasks.js';

if (parentPort !== null) serveTasks(TEST_TASKS, parentPort);
