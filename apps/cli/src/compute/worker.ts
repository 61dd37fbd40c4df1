import { parentPort } from 'node:worker_threads';
import { serveTasks } from './serve-tasks.js';
import { TASKS } from './tasks.js';

if (parentPort !== null) serveTasks(TASKS, parentPort);
