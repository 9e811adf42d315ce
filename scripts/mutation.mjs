import { spawnSync } from 'node:child_process';
import fs from 'node:fs';
import path from 'node:path';
import ts from 'typescript';
import { data, inRoot, root } from './lib/paths.mjs';
import { main } from './lib/processes.mjs';
import { Stop } from './lib/stop.mjs';

/**
 * Plants faults in the engine, one at a time, and sees whether its tests notice: node scripts/mutation.mjs [how many] [seed].
 * Not part of npm test: each fault costs a run of the engine's tests. Works on a copy in .data/mutation.
 */
const SWAPS = new Map([
  [ts.SyntaxKind.LessThanToken, '<='], [ts.SyntaxKind.LessThanEqualsToken, '<'], [ts.SyntaxKind.GreaterThanToken, '>='], [ts.SyntaxKind.GreaterThanEqualsToken, '>'],
  [ts.SyntaxKind.EqualsEqualsEqualsToken, '!=='], [ts.SyntaxKind.ExclamationEqualsEqualsToken, '==='],
  [ts.SyntaxKind.PlusToken, '-'], [ts.SyntaxKind.MinusToken, '+'], [ts.SyntaxKind.AsteriskToken, '+'], [ts.SyntaxKind.PercentToken, '+'],
  [ts.SyntaxKind.AmpersandAmpersandToken, '||'], [ts.SyntaxKind.BarBarToken, '&&'],
]);
const METHODS = new Map([['add', 'sub'], ['sub', 'add'], ['mul', 'div'], ['div', 'mul'], ['some', 'every'], ['every', 'some'], ['floor', 'ceil'], ['ceil', 'floor'], ['max', 'min'], ['min', 'max']]);

/** A small generator of its own, so that a seed names its faults. */
function randomOf(seed) {
  let state = seed >>> 0;
  return (below) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return Math.floor((state / 2 ** 32) * below);
  };
}

function faultsIn(file) {
  const text = fs.readFileSync(file, 'utf8');
  const source = ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true);
  const faults = [];
  const put = (node, replacement) => faults.push({ file, start: node.getStart(), end: node.getEnd(), replacement, line: source.getLineAndCharacterOfPosition(node.getStart()).line + 1, was: node.getText() });
  const visit = (node) => {
    if (ts.isTypeNode(node) || ts.isImportDeclaration(node) || ts.isInterfaceDeclaration(node) || ts.isTypeAliasDeclaration(node)) return;
    if (ts.isBinaryExpression(node) && SWAPS.has(node.operatorToken.kind)) put(node.operatorToken, SWAPS.get(node.operatorToken.kind));
    if (ts.isPropertyAccessExpression(node) && ts.isCallExpression(node.parent) && METHODS.has(node.name.text)) put(node.name, METHODS.get(node.name.text));
    if (ts.isNumericLiteral(node)) put(node, String(Number(node.text) + 1));
    if (node.kind === ts.SyntaxKind.TrueKeyword) put(node, 'false');
    if (node.kind === ts.SyntaxKind.FalseKeyword) put(node, 'true');
    if (ts.isPrefixUnaryExpression(node) && node.operator === ts.SyntaxKind.ExclamationToken) put(node, node.operand.getText());
    if (ts.isIfStatement(node)) put(node.expression, 'false');
    ts.forEachChild(node, visit);
  };
  visit(source);
  return faults;
}

function filesIn(folder) {
  return fs.readdirSync(folder, { withFileTypes: true }).flatMap((entry) => (entry.isDirectory() ? filesIn(path.join(folder, entry.name)) : [path.join(folder, entry.name)]));
}

await main(async () => {
  const [howMany = '60', seed = '1'] = process.argv.slice(2);
  const copy = path.join(data, 'mutation');
  fs.rmSync(copy, { recursive: true, force: true });
  fs.mkdirSync(copy, { recursive: true });
  for (const name of ['engine', 'tests', 'lib', 'db', 'components', 'tsconfig.json', 'package.json']) fs.cpSync(inRoot(name), path.join(copy, name), { recursive: true });
  fs.symlinkSync(inRoot('node_modules'), path.join(copy, 'node_modules'));
  const test = () => spawnSync(process.execPath, [inRoot('node_modules/vitest/vitest.mjs'), 'run', '-c', 'tests/vitest.config.ts', '--bail', '1', 'tests/engine', 'tests/reference'], { cwd: copy, timeout: 120_000, stdio: 'ignore' }).status;
  if (test() !== 0) throw new Stop('The engine’s tests fail without a fault: mend them first.');
  const faults = filesIn(path.join(copy, 'engine')).filter((file) => file.endsWith('.ts') && !/limits|catalogue|index/.test(file)).flatMap(faultsIn);
  const pick = randomOf(Number(seed));
  const survivors = [];
  let tried = 0;
  while (tried < Number(howMany) && faults.length > 0) {
    const [fault] = faults.splice(pick(faults.length), 1);
    const text = fs.readFileSync(fault.file, 'utf8');
    fs.writeFileSync(fault.file, text.slice(0, fault.start) + fault.replacement + text.slice(fault.end));
    const caught = test() !== 0;
    fs.writeFileSync(fault.file, text);
    tried += 1;
    const what = `${path.relative(copy, fault.file)}:${fault.line} ${fault.was.slice(0, 60)} → ${fault.replacement}`;
    if (!caught) survivors.push(what);
    console.log(`${tried} ${caught ? 'caught  ' : 'SURVIVED'} ${what}`);
  }
  console.log(`\n${tried - survivors.length} of ${tried} faults caught (${((100 * (tried - survivors.length)) / tried).toFixed(0)} %), seed ${seed}, in ${path.relative(root, copy)}`);
  return 0;
});
