import { existsSync } from 'node:fs';
import { builtinModules } from 'node:module';
import { dirname, relative, resolve, sep } from 'node:path';
import { byAddress, layers } from './layers.js';

const root = resolve(import.meta.dirname, '..');
const builtins = new Set(builtinModules);

/** Name of the layer a file of the repository belongs to; the longest path wins. @param {string} file */
export function layerOf(file) {
  const path = relative(root, file).split(sep).join('/');
  const owners = Object.entries(layers).filter(([, layer]) => path === layer.path || path.startsWith(`${layer.path}/`));
  return owners.sort((a, b) => b[1].path.length - a[1].path.length)[0]?.[0];
}

/** Package of a bare specifier as the table names it. @param {string} specifier */
function packageOf(specifier) {
  if (specifier.startsWith('node:') || builtins.has(specifier)) return 'node';
  const [scope = '', name] = specifier.split('/');
  return scope.startsWith('@') ? `${scope}/${name ?? ''}` : scope;
}

/** The file a relative specifier means: sources are TypeScript, imports end in `.js`. @param {string} from @param {string} specifier */
function fileOf(from, specifier) {
  const file = resolve(dirname(from), specifier.replace(/\?.*$/, ''));
  const typed = file.replace(/\.js$/, '.ts');
  return existsSync(typed) || !existsSync(file) ? typed : file;
}

/** Why `from` may not import `specifier`, or null. @param {string} from absolute path @param {string} specifier @param {boolean} [asAddress] */
export function violation(from, specifier, asAddress = false) {
  const name = layerOf(from);
  const layer = name === undefined ? undefined : layers[name];
  if (name === undefined || layer === undefined) return null;
  if (!specifier.startsWith('.')) {
    const wanted = packageOf(specifier);
    const allowed = (layer.packages ?? []).some((each) => each === wanted || wanted.startsWith(`${each}/`));
    return allowed ? null : `'${name}' may not use the package '${wanted}'.`;
  }
  const file = fileOf(from, specifier);
  const target = layerOf(file);
  if (target === name) return null;
  if (target === undefined) return `'${name}' may not import from outside the layers ('${specifier}').`;
  const reach = asAddress ? [...layer.layers, ...(byAddress[/** @type {'renderer'} */ (name)] ?? [])] : layer.layers;
  if (!reach.includes(target)) return `'${name}' may not import '${target}' ('${specifier}').`;
  return hidden(target, file) ? `'${specifier}' is not a public face of '${target}'.` : null;
}

/** @param {string} target @param {string} file */
function hidden(target, file) {
  const layer = layers[target];
  const inside = relative(resolve(root, layer?.path ?? ''), file)
    .split(sep)
    .join('/');
  return layer?.faces !== undefined && !layer.faces.some((face) => face.test(inside));
}

/**
 * Imports of every form, and addresses of modules (`new URL('./x.ts', import.meta.url)`), against the table.
 * @type {import('eslint').Rule.RuleModule}
 */
export const layerRule = {
  meta: { type: 'problem', schema: [], docs: { description: 'imports point one way, as .config/layers.js has it' } },
  create(context) {
    /** @param {import('estree').Node | null | undefined} source @param {boolean} [asAddress] */
    const check = (source, asAddress) => {
      if (source?.type !== 'Literal' || typeof source.value !== 'string') return;
      const message = violation(context.filename, source.value, asAddress);
      if (message !== null) context.report({ node: source, message });
    };
    return {
      ImportDeclaration: (node) => check(node.source),
      ExportNamedDeclaration: (node) => check(node.source),
      ExportAllDeclaration: (node) => check(node.source),
      ImportExpression: (node) => check(node.source),
      /** @param {any} node */
      TSImportType: (node) => check(node.source ?? node.argument?.literal),
      NewExpression: (node) => {
        const [first] = node.arguments;
        if (node.callee.type === 'Identifier' && node.callee.name === 'URL' && node.arguments.length === 2)
          if (first?.type === 'Literal' && /^\.{1,2}\/.*\.(js|ts|svelte)$/.test(String(first.value)))
            check(first, true);
      },
    };
  },
};
