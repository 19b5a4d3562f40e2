/** Finds the strings of a source text that a person using the package can see. */
import ts from "typescript";

/** Properties and variables whose texts are shown even when they are a single word. */
const shownKeys =
  /^(label|title|name|heading|notes?|summary|sentence|message|meaning|usage|why|reason|remedy|remarks|cautions?|what|unit|otherNames|question|by|measure|level|mistakenFor|formula|related)$/;

/** Functions whose text arguments are never read by a person. */
const mechanical =
  /(^|\.)(split|join|replace|replaceAll|startsWith|endsWith|includes|indexOf|test|run|querySelector|getAttribute|createHash|require|resolve|import)$/;

/** Markup, style sheets, queries, programs, security policies. */
const markup =
  /^\s*<|<\/|[{;]\s*$|^\s*[.#]?[\w-]+\{|:\s*#[0-9a-f]{6}|\bSELECT\b|\bFROM\b|\bCAST\(|\bAS (DOUBLE|s\{)|read_csv\(|(font-family|background):|-src '|linear-gradient|^var |^function |function\s*\(/;

const kebabCase = /^[a-z]+(-[a-z]+)*$/;
const letters = /\p{L}{2}/u;
const severalWords = /\p{L}[\p{L}\p{N}"”')\].,:;?!%}-]*\s+[\p{L}\p{N}"({“]/u;

/** The strings that a reader sees, with the line of each; what is put into a text stands in braces. */
export function shownStrings(source, path) {
  const file = ts.createSourceFile(path, source, ts.ScriptTarget.ES2022, true);
  const found = [];
  const visit = (node) => {
    const text = isReadByProgramsOnly(node) ? undefined : textOf(node);
    if (text === undefined || !isShown(text, keyOf(node))) return ts.forEachChild(node, visit);
    const line = file.getLineAndCharacterOfPosition(node.getStart(file)).line + 1;
    found.push({ line, text: text.replace(/\n/g, "\\n") });
    // What is put into a text may hold texts of its own.
    insertions(node).forEach(visit);
  };
  visit(file);
  return found;
}

function isShown(text, key) {
  if (markup.test(text)) return false;
  const own = text.replace(/\{[^}]*\}/g, "");
  return (shownKeys.test(key ?? "") && letters.test(own)) || severalWords.test(text);
}

/** The text of a literal, or of several that are added up. */
function textOf(node) {
  if (ts.isStringLiteralLike(node)) return node.text;
  if (ts.isTemplateExpression(node)) {
    const parts = node.templateSpans.map(({ expression, literal }) => braced(expression) + literal.text);
    return node.head.text + parts.join("");
  }
  if (!isSum(node)) return undefined;
  const [left, right] = [node.left, node.right].map(textOf);
  if (left === undefined && right === undefined) return undefined;
  return (left ?? braced(node.left)) + (right ?? braced(node.right));
}

const isSum = (node) => ts.isBinaryExpression(node) && node.operatorToken.kind === ts.SyntaxKind.PlusToken;

function braced(expression) {
  const text = expression.getText().replace(/\s+/g, " ");
  return `{${text.length > 40 ? `${text.slice(0, 37)}...` : text}}`;
}

/** The expressions that a text puts in. */
function insertions(node) {
  if (ts.isTemplateExpression(node)) return node.templateSpans.map(({ expression }) => expression);
  if (!isSum(node)) return [];
  return [node.left, node.right].flatMap((side) => (textOf(side) === undefined ? [side] : insertions(side)));
}

/** The property or variable that a text is put under. */
function keyOf(node) {
  let at = node.parent;
  while (at && (ts.isArrayLiteralExpression(at) || ts.isConditionalExpression(at))) at = at.parent;
  return at && (ts.isPropertyAssignment(at) || ts.isVariableDeclaration(at)) ? at.name.getText() : undefined;
}

/** Imports, types, keys, comparisons, codes of errors. */
function isReadByProgramsOnly(node) {
  const { parent } = node;
  if (parent === undefined) return false;
  const isCall = ts.isCallExpression(parent) || ts.isNewExpression(parent);
  return (
    ts.isImportDeclaration(parent) ||
    ts.isExportDeclaration(parent) ||
    ts.isLiteralTypeNode(parent) ||
    ts.isElementAccessExpression(parent) ||
    ts.isCaseClause(parent) ||
    (ts.isPropertyAssignment(parent) && parent.name === node) ||
    (ts.isBinaryExpression(parent) && /^(===|!==|in)$/.test(parent.operatorToken.getText())) ||
    (isCall && (mechanical.test(parent.expression.getText()) || kebabCase.test(node.text ?? "")))
  );
}
