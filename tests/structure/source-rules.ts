// Rules that say in which one place a thing may stand, read from the syntax tree: a word in a comment is no breach.
import ts from 'typescript';

export interface Source {
  /** path from the project's root */
  file: string;
  text: string;
}
export interface Rule {
  name: string;
  /** Lines with what is wrong; empty when the file keeps the rule. */
  breaches: (source: Source) => string[];
}

const CORE = /^lib\/(units|physics|control|analysis|wording|schema|field|live)\//;
const WORKER = /^worker\//;
const CLOCK = /^worker\/((yard|door)\/)?clock\.ts$/;

/** Server files that may call fetch: none fetches an address that a user gave. */
/** The simulated yard's door on loopback, at a port that the start gives out. */
const MAY_FETCH: string[] = ['lib/server/training.ts'];
/** Refuses our own words in passwords, those of the roles among them. */
const PASSWORD_BLOCKLIST = 'lib/schema/password.ts';
const ROLES = new Set(['owner', 'grower', 'installer']);

export const RULES: Rule[] = [
  {
    name: 'environment: process.env only in lib/server/env.ts',
    breaches: (source) =>
      source.file === 'lib/server/env.ts'
        ? []
        : nodesOf(source, (node, at) => {
            // Next puts a constant in this one's place when it builds
            if (isMember(node, 'process', 'env') && !isNextRuntime(node)) return at('process.env');
            if (importsFrom(node, /^(node:)?process$/)) return at('an import of process');
            return null;
          }),
  },
  {
    name: 'time and chance: never in cores, in the worker only in clock.ts',
    breaches: (source) =>
      !(CORE.test(source.file) || WORKER.test(source.file)) || CLOCK.test(source.file)
        ? []
        : nodesOf(source, (node, at) => {
            if (isMember(node, 'Date', 'now')) return at('Date.now');
            if (isMember(node, 'performance', 'now')) return at('performance.now');
            if (isMember(node, 'Math', 'random')) return at('Math.random');
            if (isMember(node, 'process', 'hrtime')) return at('process.hrtime');
            if (ts.isNewExpression(node) && isNamed(node.expression, 'Date') && !node.arguments?.length) {
              return at('new Date()');
            }
            if (ts.isCallExpression(node) && isNamed(node.expression, /^(setTimeout|setInterval|Date)$/)) {
              return at(node.expression.getText());
            }
            if (importsFrom(node, /^(node:)?timers/)) return at('an import of timers');
            return null;
          }),
  },
  {
    name: 'role names only in lib/server/permissions',
    breaches: (source) =>
      source.file.startsWith('lib/server/permissions') || source.file === PASSWORD_BLOCKLIST
        ? []
        : nodesOf(source, (node, at) =>
            ts.isStringLiteralLike(node) && ROLES.has(node.text) ? at(`'${node.text}'`) : null,
          ),
  },
  {
    name: 'server-side fetch only where a list names it',
    breaches: (source) =>
      !/^(app\/api|db|lib|worker)\//.test(source.file) || MAY_FETCH.includes(source.file)
        ? []
        : nodesOf(source, (node, at) =>
            ts.isCallExpression(node) && isNamed(node.expression, 'fetch') ? at('fetch') : null,
          ),
  },
  {
    name: 'no barrels: a file does something, it does not only hand on',
    breaches: (source) => {
      const { statements } = parse(source);
      const handsOn = (statement: ts.Statement) =>
        ts.isExportDeclaration(statement) || ts.isImportDeclaration(statement);
      return statements.length > 0 && statements.every(handsOn) && statements.some(ts.isExportDeclaration)
        ? ['only exports what others have']
        : [];
    },
  },
];

function parse({ file, text }: Source): ts.SourceFile {
  return ts.createSourceFile(file, text, ts.ScriptTarget.Latest, true);
}

function nodesOf(
  source: Source,
  look: (node: ts.Node, at: (what: string) => string) => string | null,
): string[] {
  const tree = parse(source);
  const found: string[] = [];
  const visit = (node: ts.Node): void => {
    const at = (what: string) => {
      const { line } = tree.getLineAndCharacterOfPosition(node.getStart(tree));
      return `line ${line + 1}: ${what}`;
    };
    const breach = look(node, at);
    if (breach !== null) found.push(breach);
    ts.forEachChild(node, visit);
  };
  visit(tree);
  return found;
}

function isNamed(node: ts.Node, name: string | RegExp): boolean {
  if (!ts.isIdentifier(node)) return false;
  return typeof name === 'string' ? node.text === name : name.test(node.text);
}

function isMember(node: ts.Node, object: string, member: string): boolean {
  if (ts.isPropertyAccessExpression(node)) {
    return isNamed(node.expression, object) && node.name.text === member;
  }
  return (
    ts.isElementAccessExpression(node) &&
    isNamed(node.expression, object) &&
    ts.isStringLiteralLike(node.argumentExpression) &&
    node.argumentExpression.text === member
  );
}

function isNextRuntime(node: ts.Node): boolean {
  return ts.isPropertyAccessExpression(node.parent) && node.parent.name.text === 'NEXT_RUNTIME';
}

function importsFrom(node: ts.Node, specifier: RegExp): boolean {
  return (
    ts.isImportDeclaration(node) &&
    ts.isStringLiteral(node.moduleSpecifier) &&
    specifier.test(node.moduleSpecifier.text)
  );
}
