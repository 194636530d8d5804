// npm run bench: first table of speeds. Every number has a reference measured in the same run.
import { figureTimes } from './figure-times.js';
import { batchMemory, batchThroughput } from './batch-throughput.js';
import { formTimes } from './form-times.js';
import { httpLoad } from './http-load.js';
import { jsonTimes } from './json-times.js';
import { poolScaling } from './pool-scaling.js';
import { queueThroughput } from './queue-throughput.js';
import { recordTimes } from './record-times.js';
import { solveTimes } from './solve-times.js';

console.log(`Node ${process.version}`);
solveTimes();
recordTimes();
jsonTimes();
formTimes();
figureTimes();
await poolScaling();
await httpLoad();
await batchThroughput();
await batchMemory();
await queueThroughput();
