import { createRequire } from "node:module";
import { FormulaError } from "./formulaError";
import {
  type FormulaKind,
  formulaConstants,
  formulaFunctions,
  formulaOperators,
  longestFormula,
} from "./formulaGrammar";

/** A formula that was written as text, compiled. */
export interface Formula {
  readonly text: string;
  /** The variables that it contains. */
  readonly variables: readonly string[];
  /** The formula's value; NaN where it has none, such as log(-1). */
  readonly evaluate: (values: Readonly<Record<string, number>>) => number;
}

/** Functions of mathjs that reach beyond arithmetic; no formula gets through to them, and they are out of reach besides. */
const forbidden = [
  "import",
  "createUnit",
  "evaluate",
  "parse",
  "simplify",
  "derivative",
  "compile",
  "parser",
  "resolve",
  "rationalize",
  "reviver",
  "replacer",
  "help",
  "chain",
  "config",
];

/** What is used of a parsed formula; mathjs's own declarations cannot be read from CommonJS. */
interface ParsedFormula {
  compile(): { evaluate(scope: Record<string, number>): unknown };
}

interface NumberMath {
  parse(text: string): ParsedFormula;
  import(functions: Record<string, () => never>, options: { override: boolean }): void;
}

let parse: NumberMath["parse"] | undefined;

/** The parser of mathjs for plain numbers, loaded at the first formula. */
function parser(): NumberMath["parse"] {
  if (parse === undefined) {
    const { all, create } = createRequire(__filename)("mathjs/number") as {
      all: unknown;
      create: (factories: unknown) => NumberMath;
    };
    const math = create(all);
    parse = math.parse;
    const refuse = Object.fromEntries(
      forbidden.map((name) => [
        name,
        () => {
          throw new Error(`${name} is not for formulas`);
        },
      ]),
    );
    math.import(refuse, { override: true });
  }
  return parse;
}

/**
 * Compiles a formula that a user wrote, with mathjs restricted to arithmetic.
 *
 * Numbers, + - * / ^, parentheses, the functions of formulaGrammar.ts, pi and e, the variables named, and cases by
 * `condition ? value : value` with < <= > >= and or not. Everything else is refused: assignments, definitions of functions, texts, lists,
 * units, access to properties. A product without its sign (0.1 z) is understood, but not beside a division, where 1/2 z may
 * mean two things.
 *
 * @param text at most 500 characters; @param variables names that may occur.
 * Throws FormulaError with the reason and the place. Nothing of the text is ever run as code.
 * @example compileFormula("-1 + 0.1 z/(1 + z)", ["z"]).evaluate({ z: 1 }) // -0.95
 */
export function compileFormula(text: string, variables: readonly string[]): Formula {
  if (typeof text !== "string") throw new FormulaError(String(text), "must be text");
  if (text.trim() === "") throw new FormulaError(text, "is empty");
  if (text.length > longestFormula) {
    throw new FormulaError(text, `has ${text.length} characters; ${longestFormula} are allowed`);
  }
  const root = parsed(text);
  const checker = new FormulaChecker(text, variables);
  if (checker.check(root) !== "number") {
    throw new FormulaError(text, "gives true or false, not a number", undefined, "use it as condition ? value : value");
  }
  const compiled = root.compile();
  const used = variables.filter((name) => checker.used.has(name));
  return {
    text,
    variables: used,
    evaluate: (values) => {
      const scope: Record<string, number> = {};
      for (const name of used) scope[name] = values[name] ?? Number.NaN;
      const value: unknown = compiled.evaluate(scope);
      return typeof value === "number" ? value : Number.NaN;
    },
  };
}

function parsed(text: string): ParsedFormula {
  try {
    return parser()(text);
  } catch (failure) {
    const message = failure instanceof Error ? failure.message : String(failure);
    const { char } = failure as { char?: unknown };
    const reason = message.replace(/ \(char \d+\)$/, "");
    const words = `cannot be read: ${reason.charAt(0).toLowerCase()}${reason.slice(1)}`;
    throw new FormulaError(text, words, typeof char === "number" ? char : undefined);
  }
}

/** What mathjs's node types are called in a refusal. */
const refusedNodes: Readonly<Record<string, string>> = {
  AccessorNode: "reads a property or an element",
  ArrayNode: "has a list",
  AssignmentNode: "assigns a value",
  BlockNode: "has more than one statement",
  FunctionAssignmentNode: "defines a function",
  IndexNode: "has an index",
  ObjectNode: "has an object",
  RangeNode: "has a range",
};

/** The fields of mathjs's nodes that the check reads. */
interface Node {
  readonly type: string;
  readonly name?: string;
  readonly value?: unknown;
  readonly fn?: unknown;
  readonly op?: string;
  readonly implicit?: boolean;
  readonly args?: readonly Node[];
  readonly content?: Node;
  readonly condition?: Node;
  readonly trueExpr?: Node;
  readonly falseExpr?: Node;
  readonly params?: readonly Node[];
  readonly conditionals?: readonly string[];
}

/** Walks a parsed formula and refuses whatever is not on the lists. */
class FormulaChecker {
  readonly used = new Set<string>();

  constructor(
    private readonly text: string,
    private readonly variables: readonly string[],
  ) {}

  check(root: ParsedFormula): FormulaKind {
    return this.kindOf(root as unknown as Node);
  }

  private kindOf(node: Node): FormulaKind {
    switch (node.type) {
      case "ConstantNode":
        return this.constant(node.value);
      case "SymbolNode":
        return this.symbol(node.name!);
      case "ParenthesisNode":
        return this.kindOf(node.content!);
      case "FunctionNode":
        return this.call(node);
      case "OperatorNode":
        return this.operator(node);
      case "RelationalNode":
        for (const each of node.params!) this.expect(each, "number", "a comparison");
        if (node.conditionals!.every((name) => formulaOperators.has(name))) return "condition";
        throw this.refuse("has an operator that formulas do not take");
      case "ConditionalNode":
        this.expect(node.condition!, "condition", "what stands before ?");
        this.expect(node.trueExpr!, "number", "what stands behind ?");
        this.expect(node.falseExpr!, "number", "what stands behind :");
        return "number";
      default:
        throw this.refuse(refusedNodes[node.type] ?? "has something that formulas do not take");
    }
  }

  private constant(value: unknown): FormulaKind {
    if (typeof value === "boolean") return "condition";
    if (typeof value !== "number") throw this.refuse("has a text or another thing that is no number");
    if (!Number.isFinite(value)) throw this.refuse("has a number that is not finite");
    return "number";
  }

  private symbol(name: string): FormulaKind {
    if (this.variables.includes(name)) {
      this.used.add(name);
      return "number";
    }
    if (formulaConstants.includes(name)) return "number";
    if (formulaFunctions.has(name)) {
      throw this.refuse(`has the function ${name} without an argument`, name, `write ${name}(...)`);
    }
    const known = [...this.variables, ...formulaConstants, ...formulaFunctions.keys()].join(", ");
    throw this.refuse(`has an unknown name ${name}`, name, `known: ${known}`);
  }

  private call(node: Node): FormulaKind {
    const { fn } = node;
    const name = typeof fn === "object" && fn !== null ? (fn as Node) : undefined;
    if (name?.type !== "SymbolNode") throw this.refuse(refusedNodes["AccessorNode"]!);
    const arity = formulaFunctions.get(name.name!);
    if (arity === undefined) {
      const factor = this.variables.includes(name.name!) || formulaConstants.includes(name.name!);
      throw this.refuse(
        factor ? `calls ${name.name}, which is no function` : `has an unknown function ${name.name}`,
        name.name,
        factor ? `write ${name.name}*(...) for a product` : `known: ${[...formulaFunctions.keys()].join(", ")}`,
      );
    }
    const count = node.args!.length;
    if (count < arity[0] || count > arity[1]) {
      const wanted = arity[0] === arity[1] ? `${arity[0]}` : `${arity[0]} to ${arity[1]}`;
      throw this.refuse(`gives ${name.name} ${count} argument${count === 1 ? "" : "s"}, it takes ${wanted}`, name.name);
    }
    for (const each of node.args!) this.expect(each, "number", `an argument of ${name.name}`);
    return "number";
  }

  private operator(node: Node): FormulaKind {
    const kinds = formulaOperators.get(String(node.fn));
    if (kinds === undefined) throw this.refuse(`has the operator ${node.op}, which formulas do not take`, node.op);
    const args = node.args!;
    const beside = (each: Node, fn: string) => each.type === "OperatorNode" && each.fn === fn;
    const ambiguous =
      (node.fn === "divide" && beside(args[1]!, "multiply") && args[1]!.implicit === true) ||
      (node.fn === "multiply" && node.implicit === true && args.some((each) => beside(each, "divide")));
    if (ambiguous) {
      const hint = "write the product with *, or put parentheses";
      throw this.refuse("has a product without its sign beside a division, which may mean two things", undefined, hint);
    }
    for (const each of args) this.expect(each, kinds[0], `what stands beside ${node.op}`);
    return kinds[1];
  }

  private expect(node: Node, kind: FormulaKind, what: string): void {
    if (this.kindOf(node) === kind) return;
    const wanted = kind === "number" ? "a number" : "a comparison such as z < 1";
    throw this.refuse(`needs ${wanted} for ${what}`);
  }

  private refuse(reason: string, piece?: string, hint?: string): FormulaError {
    return new FormulaError(this.text, reason, piece === undefined ? undefined : this.placeOf(piece), hint);
  }

  /** Where a name or sign first stands by itself, from 1: mathjs's nodes do not say. */
  private placeOf(piece: string): number | undefined {
    const escaped = piece.replace(/[.*+?^${}()|[\]\\]/g, "\\$&");
    const word = /^\w+$/.test(piece) ? `(?<![A-Za-z_])${escaped}(?![\\w])` : escaped;
    const found = new RegExp(word).exec(this.text);
    return found === null ? undefined : found.index + 1;
  }
}
