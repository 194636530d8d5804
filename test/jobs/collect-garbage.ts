import { setFlagsFromString } from 'node:v8';
import { runInNewContext } from 'node:vm';

setFlagsFromString('--expose-gc');
const collect = runInNewContext('gc') as () => void;

/** Bytes of the array buffers that are still reachable. */
export function reachableBufferBytes(): number {
  collect();
  collect();
  return process.memoryUsage().arrayBuffers;
}
