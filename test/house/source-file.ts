import { parseSync } from 'vite';

/** What the house rules need to know of one TypeScript file. */
export interface SourceFile {
  /** Path below `src/`, with forward slashes: `spectrum/phase.ts`. */
  readonly path: string;
  readonly lineCount: number;
  /** Every module named by an import, a dynamic import, or a type import. */
  readonly imports: readonly string[];
  /** Every module named by `export … from`. */
  readonly reexports: readonly string[];
  /** Free names used as values: `Date`, `process`, `Math.random`, `import.meta`, … */
  readonly names: ReadonlySet<string>;
  /** Whether the file holds nothing but types (it vanishes when compiled). */
  readonly typesOnly: boolean;
}

interface SyntaxNode {
  readonly type: string;
  readonly [field: string]: unknown;
}

const typeDeclarations = new Set(['TSTypeAliasDeclaration', 'TSInterfaceDeclaration']);
const typePositions = new Set([
  ...typeDeclarations,
  'TSTypeAnnotation',
  'TSTypeParameterDeclaration',
  'TSTypeParameterInstantiation',
]);

/** Reads the syntax tree of a file; throws where the text does not parse. */
export function readSourceFile(path: string, text: string): SourceFile {
  const { program, errors } = parseSync(path, text, { lang: 'ts' });
  if (errors.length > 0) throw new SyntaxError(`${path}: ${errors[0].message}`);
  const imports: string[] = [];
  const reexports: string[] = [];
  const names = new Set<string>();
  visit(program as unknown as SyntaxNode, false);
  const body = program.body as unknown as SyntaxNode[];
  return {
    path,
    lineCount: text.replace(/\n$/, '').split('\n').length,
    imports,
    reexports,
    names,
    typesOnly: body.every(isTypeOnly),
  };

  function visit(node: SyntaxNode, inType: boolean): void {
    const source = (node.source as SyntaxNode | null | undefined)?.value;
    if (typeof source === 'string') {
      (node.type.startsWith('Export') ? reexports : imports).push(source);
    }
    if (!inType) collectNames(node);
    const within = inType || typePositions.has(node.type);
    for (const [field, child] of Object.entries(node)) {
      if (isPropertyName(node, field) || (field === 'object' && isWebAssembly(node))) continue;
      for (const item of Array.isArray(child) ? child : [child]) {
        if (isNode(item)) visit(item, within);
      }
    }
  }

  function collectNames(node: SyntaxNode): void {
    if (node.type === 'Identifier') names.add(node.name as string);
    if (node.type === 'MetaProperty') names.add('import.meta');
    if (node.type === 'MemberExpression' && !node.computed) {
      const object = node.object as SyntaxNode;
      const property = node.property as SyntaxNode;
      if (object.type === 'Identifier') names.add(`${object.name as string}.${property.name as string}`);
    }
  }
}

function isNode(value: unknown): value is SyntaxNode {
  return typeof value === 'object' && value !== null && typeof (value as SyntaxNode).type === 'string';
}

/** `a.Date`, `{ Date: 1 }` and `class { Date() {} }` name a property, not the global. */
function isPropertyName(node: SyntaxNode, field: string): boolean {
  if (node.computed === true) return false;
  if (field === 'property') return node.type === 'MemberExpression';
  return field === 'key' && node.shorthand !== true;
}

/** `globalThis.WebAssembly`, cast or not: computing, nothing of the machine. */
function isWebAssembly(node: SyntaxNode): boolean {
  if (node.type !== 'MemberExpression' || (node.property as SyntaxNode).name !== 'WebAssembly') return false;
  let object = node.object as SyntaxNode;
  while (object.type === 'TSAsExpression' || object.type === 'ParenthesizedExpression') {
    object = object.expression as SyntaxNode;
  }
  return object.name === 'globalThis';
}

function isTypeOnly(statement: SyntaxNode): boolean {
  if (typeDeclarations.has(statement.type)) return true;
  if (statement.type === 'ImportDeclaration') return statement.importKind === 'type';
  if (statement.type !== 'ExportNamedDeclaration') return false;
  const declaration = statement.declaration as SyntaxNode | null;
  return declaration === null ? statement.exportKind === 'type' : typeDeclarations.has(declaration.type);
}
