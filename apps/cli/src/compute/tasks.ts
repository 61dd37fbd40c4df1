/** Every heavy computation, by the name under which verbs ask the pool for it. */
export const TASKS = {};
