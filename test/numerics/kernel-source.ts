import { readFileSync, writeFileSync } from 'node:fs';
import wabt from 'wabt';

/**
 * A committed kernel, `<name>.ts`, and what its source `<name>.wat` assembles to. Run with WRITE_KERNEL=1
 * it writes the file after a change of the source.
 */
export async function kernelTexts(
  name: string,
  constant: string,
): Promise<{ readonly committed: string; readonly assembled: string }> {
  const source = new URL(`../../src/numerics/${name}.wat`, import.meta.url);
  const generated = new URL(`../../src/numerics/${name}.ts`, import.meta.url);
  const tools = await wabt();
  const module = tools.parseWat(`${name}.wat`, readFileSync(source, 'utf8'), { simd: true });
  const bytes = Buffer.from(module.toBinary({}).buffer);
  const lines = (bytes.toString('base64').match(/.{1,100}/g) ?? []).map((line) => `  '${line}',`);
  const text = [
    `/** ${name}.wat assembled: do not edit, run the kernel test with WRITE_KERNEL=1. */`,
    `export const ${constant}: readonly string[] = [`,
    ...lines,
    '];',
    '',
  ].join('\n');
  if (process.env['WRITE_KERNEL'] === '1') writeFileSync(generated, text);
  return { committed: readFileSync(generated, 'utf8'), assembled: text };
}
