import { operations } from './operations.ts';
import { serveTasks } from './serve-task.ts';
import { warmUp } from './warm-up.ts';

/** Entry of a worker thread: warms up, then serves the tasks of the pool. */
warmUp(operations);

export default serveTasks(operations);
