/** What TypeScript and Node code may not say, read from its syntax tree. */
import ts from "typescript";
import { AREAS } from "../areas.mjs";
import { isCode, type SourceFile, type Violation } from "./source-files";

const business = AREAS.filter((area) => area !== "core" && area !== "platform").join("|");
const QUERIES = new RegExp(`^lib/(${business})/queries(/|\\.ts$)`);
const SERVER_FILES = new RegExp(`^lib/(${business})/(queries|commands)(/|\\.ts$)`);
/** These take the time from their context. */
const CLOCKLESS = new RegExp(
  `^lib/(${business})/(rules|queries|commands|contract|terms)(/|\\.ts$)`,
);
/**
 * The one way to write, the files under it, the ledger's worker with its own connection, and the
 * browser's queue, whose transactions are IndexedDB's.
 */
const MAY_TRANSACT =
  /^(lib\/platform\/database\.ts|db\/|tests\/|lib\/offline\/|lib\/ledger\/\w+\/[\w-]*worker\.ts)/;
const SILENCED =
  /(?:\/\/|\/\*)\s*(?:@ts-(?:ignore|nocheck)|eslint-disable(?!-next-line [\w@/-]+ -- \S))/;
const WRITERS = new Set(["inTransaction", "once", "postAct", "reverseAct", "recordAudit"]);

type Add = (rule: string, node: ts.Node, detail: string) => void;

function importedNames(node: ts.ImportDeclaration): string[] {
  const clause = node.importClause;
  if (!clause || clause.phaseModifier === ts.SyntaxKind.TypeKeyword) return [];
  const bindings = clause.namedBindings;
  if (!bindings || !ts.isNamedImports(bindings)) return [];
  return bindings.elements
    .filter((element) => !element.isTypeOnly)
    .map((element) => (element.propertyName ?? element.name).text);
}

function checkCall(file: string, node: ts.CallExpression, add: Add): void {
  if (!ts.isPropertyAccessExpression(node.expression)) return;
  const { name, expression } = node.expression;
  if (name.text === "transaction" && !MAY_TRANSACT.test(file)) {
    add("one-way-to-write", node, "transactions go through inTransaction");
  }
  if (name.text === "watch" && /^(app|components)\//.test(file)) {
    add("no-watch", node, "useWatch renders what changed, and nothing else");
  }
  if (
    name.text === "now" &&
    ts.isIdentifier(expression) &&
    expression.text === "Date" &&
    CLOCKLESS.test(file)
  ) {
    add("no-clock", node, "the time is in the context");
  }
}

function checkNode(file: string, node: ts.Node, add: Add): void {
  if (node.kind === ts.SyntaxKind.AnyKeyword) add("no-any", node, "any");
  else if (ts.isCallExpression(node)) checkCall(file, node, add);
  else if (
    ts.isNewExpression(node) &&
    ts.isIdentifier(node.expression) &&
    node.expression.text === "Date" &&
    (node.arguments?.length ?? 0) === 0 &&
    CLOCKLESS.test(file)
  ) {
    add("no-clock", node, "the time is in the context");
  } else if (ts.isImportDeclaration(node) && QUERIES.test(file)) {
    for (const name of importedNames(node)) {
      if (WRITERS.has(name)) add("queries-read", node, name);
    }
  } else if (
    ts.isExpressionStatement(node) &&
    ts.isStringLiteral(node.expression) &&
    node.expression.text === "use server"
  ) {
    add("no-server-actions", node, "writes go through route handlers");
  } else if (ts.isExportDeclaration(node) && !node.exportClause && node.moduleSpecifier) {
    add("no-barrel", node, "export * hides where a thing is");
  }
}

function startsServerOnly(source: ts.SourceFile): boolean {
  return source.statements.some(
    (statement) =>
      ts.isImportDeclaration(statement) &&
      ts.isStringLiteral(statement.moduleSpecifier) &&
      statement.moduleSpecifier.text === "server-only",
  );
}

/** Words and calls that the architecture leaves to one place, or to none. */
export function codeViolations(files: readonly SourceFile[]): Violation[] {
  const found: Violation[] = [];
  for (const { name, text } of files) {
    if (!isCode(name)) continue;
    const source = ts.createSourceFile(
      name,
      text,
      ts.ScriptTarget.Latest,
      false,
      name.endsWith("x")
        ? ts.ScriptKind.TSX
        : name.endsWith(".mjs")
          ? ts.ScriptKind.JS
          : ts.ScriptKind.TS,
    );
    const add: Add = (rule, node, detail) => {
      const { line } = source.getLineAndCharacterOfPosition(node.getStart(source));
      found.push({ rule, file: name, detail: `line ${line + 1}: ${detail}` });
    };
    const visit = (node: ts.Node): void => {
      checkNode(name, node, add);
      ts.forEachChild(node, visit);
    };
    visit(source);
    const silenced = SILENCED.exec(text);
    if (silenced) found.push({ rule: "no-silencing", file: name, detail: silenced[0] });
    if (SERVER_FILES.test(name) && !startsServerOnly(source)) {
      found.push({ rule: "server-only", file: name, detail: `import "server-only" is missing` });
    }
  }
  return found;
}
