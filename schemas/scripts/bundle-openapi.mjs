/**
 * Bundles openapi.yaml and the files it refers to into one document, as it is served:
 * dist/openapi.json and dist/openapi.yaml (or in the folder given as argument). Beside them,
 * dist/examples.json lists the examples with their texts as they are written, in the order of the
 * document.
 *
 * After bundling, unions get the mapping of their discriminator (Ajv does not take one in the
 * schema files, generators of clients need it), what only a separate file needs is dropped, and
 * the examples are put in.
 */
import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { parse, stringify } from 'yaml';

const top = new URL('../../', import.meta.url);
const target = process.argv[2] === undefined ? new URL('dist/', top) : pathToFileURL(`${process.argv[2]}/`);

function bundle() {
  const folder = mkdtempSync(join(tmpdir(), 'openapi-'));
  const file = join(folder, 'openapi.json');
  const command = fileURLToPath(new URL('node_modules/.bin/redocly', top));
  try {
    execFileSync(process.execPath, [command, 'bundle', 'openapi.yaml', '--ext', 'json', '--output', file], {
      cwd: fileURLToPath(top),
      env: { ...process.env, REDOCLY_TELEMETRY: 'off', REDOCLY_SUPPRESS_UPDATE_NOTICE: 'true' },
      stdio: ['ignore', 'ignore', 'pipe'],
    });
    return JSON.parse(readFileSync(file, 'utf8'));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function addMapping(schema, schemas) {
  const { discriminator, oneOf } = schema;
  const tagOf = ({ $ref }) => schemas[$ref.split('/').at(-1)].properties[discriminator.propertyName].const;
  const mapping = Object.fromEntries(oneOf.map((branch) => [tagOf(branch), branch.$ref]));
  schema.discriminator = { ...discriminator, mapping };
}

function inlineExamples(value) {
  if (typeof value !== 'object' || value === null) return;
  const { externalValue } = value;
  if (typeof externalValue === 'string') {
    delete value.externalValue;
    value.value = JSON.parse(readFileSync(new URL(externalValue, top), 'utf8'));
  } else {
    Object.values(value).forEach(inlineExamples);
  }
}

/** Every example of a request: its name, what it shows, its operation, its text as it is written. */
function listExamples() {
  const { paths } = parse(readFileSync(new URL('openapi.yaml', top), 'utf8'));
  return Object.entries(paths).flatMap(([url, { post }]) =>
    Object.values(post?.requestBody.content['application/json']?.examples ?? {}).map(
      ({ summary, externalValue }) => ({
        name: basename(externalValue, '.json'),
        title: summary,
        operation: basename(url),
        text: readFileSync(new URL(externalValue, top), 'utf8'),
      }),
    ),
  );
}

const document = bundle();
const { schemas } = document.components;
for (const schema of Object.values(schemas)) {
  delete schema.$schema;
  delete schema.$defs;
  if (schema.discriminator !== undefined) addMapping(schema, schemas);
}
inlineExamples(document.paths);

mkdirSync(target, { recursive: true });
writeFileSync(new URL('openapi.json', target), JSON.stringify(document));
writeFileSync(new URL('examples.json', target), JSON.stringify(listExamples()));
writeFileSync(
  new URL('openapi.yaml', target),
  stringify(document, { aliasDuplicateObjects: false, lineWidth: 0 }),
);
