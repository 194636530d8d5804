// npm run demo: starts the service, solves three examples over HTTP, prints what came of them, and
// keeps serving until it is stopped.
import { readFileSync } from 'node:fs';
import { solveExample } from './solve-example.js';
import { startService } from './start-service.js';
import { summarise } from './summary.js';

const examples = [
  { file: 'struck-pile.json', title: 'A pile struck by a ram' },
  { file: 'stay-cable-release.json', title: 'A stay cable, pulled and released' },
  { file: 'machine-on-tie-rod.json', title: 'A tie rod that carries a running machine' },
];

const service = await startService();
console.log(`Tailbound serves on ${service.url}`);
try {
  for (const { file, title } of examples) {
    const request = JSON.parse(
      readFileSync(new URL(`../../schemas/examples/${file}`, import.meta.url), 'utf8'),
    );
    console.log(`\n${summarise(title, file, await solveExample(service.url, request))}`);
  }
} catch (error) {
  console.error(error.message);
  await service.stop();
  process.exit(1);
}
console.log(`
Call it yourself, from this folder:

  curl -s ${service.url}/v1/responses -H 'content-type: application/json' -d @schemas/examples/${examples[0].file}

To look at: ${service.url}/ shows the examples with their figures, ${service.url}/docs is the reference.
Serving until you stop it (Ctrl-C).`);
process.exit(await service.ended);
