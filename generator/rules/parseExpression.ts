import type { ConstantNode, FunctionNode, MathNode, OperatorNode, SymbolNode } from 'mathjs';
import { nearest } from '../base/nearest.ts';
import { dimensionless, type UnitScale, unitScale } from './Dimension.ts';
import type { Arithmetic, Expression, ExpressionFault, FunctionName } from './Expression.ts';
import { functionNames } from './Expression.ts';
import { parse } from './mathLibrary.ts';
import { isQuantityName, quantities } from './quantities.ts';
import type { Comparison } from './RuleDeck.ts';

/** Bounds of one expression: an honest rule is far below each. */
export const expressionBounds = { characters: 400, nodes: 64, depth: 16 } as const;

const arithmetic: ReadonlySet<string> = new Set(['+', '-', '*', '/', '^']);
const comparisons: ReadonlySet<string> = new Set(['<=', '>=', '<', '>']);

/** Letters, figures, operators and brackets; no quotes, indices, semicolons, colons, hashes or braces. */
const foreignCharacter = /[^A-Za-z0-9_ .,()+\-*/^<>=%]/u;

/**
 * The gate: reads an expression and lets through only what {@link Expression} can hold.
 *
 * The library only parses; its own functions, its units and its scope are never evaluated.
 * @param text one expression; white space of any kind separates
 * @returns the closed tree, or every fault found
 */
export function parseExpression(text: string): Expression | readonly ExpressionFault[] {
  // One character for one, so that offsets stay true. A line break would begin a second statement.
  const line = text.replace(/\s/gu, ' ').replace(/[µμ]/gu, 'u');
  if (line.length > expressionBounds.characters) return [tooLarge(`${line.length} characters`)];
  if (line.trim() === '') return [fault('expression-empty', 0, 'an expression', 'nothing', 'write it')];
  const foreign = foreignCharacter.exec(line);
  if (foreign !== null) {
    return [
      notAllowed(foreign.index, JSON.stringify(String.fromCodePoint(text.codePointAt(foreign.index)!))),
    ];
  }
  let root: MathNode;
  try {
    root = parse(line);
  } catch (error) {
    const at = (error as { char?: number }).char ?? 1;
    const message = error instanceof Error ? error.message : String(error);
    return [fault('expression-syntax', at - 1, 'an expression', message, 'mend the expression')];
  }
  return new Gate(line).admit(root);
}

function fault(
  code: string,
  offset: number,
  expected: string,
  received: string,
  fix: string,
): ExpressionFault {
  return { code, offset: Math.max(0, offset), expected, received, fix };
}

function notAllowed(offset: number, received: string): ExpressionFault {
  const expected = `numbers with units, quantities, + - * / ^ <= >= < > and or not, ${functionNames.join(' ')}`;
  return fault('expression-not-allowed', offset, expected, received, 'write the rule with these alone');
}

function tooLarge(received: string): ExpressionFault {
  const { characters, nodes, depth } = expressionBounds;
  const expected = `at most ${characters} characters, ${nodes} terms, ${depth} levels`;
  return fault('expression-too-large', 0, expected, received, 'split it into several rules');
}

/** One walk over one parsed expression: it gathers faults and counts nodes as it goes. */
class Gate {
  readonly #text: string;
  readonly #faults: ExpressionFault[] = [];
  #nodes = 0;
  #overgrown = false;

  constructor(text: string) {
    this.#text = text;
  }

  admit(root: MathNode): Expression | readonly ExpressionFault[] {
    const expression = this.#walk(root, 1);
    if (this.#overgrown) return [tooLarge('more terms or levels')];
    return expression !== null && this.#faults.length === 0 ? expression : this.#faults;
  }

  #walk(node: MathNode, depth: number): Expression | null {
    this.#nodes++;
    if (this.#nodes > expressionBounds.nodes || depth > expressionBounds.depth) {
      this.#overgrown = true;
      return null;
    }
    switch (node.type) {
      // Brackets cost a level: they nest as the rest does.
      case 'ParenthesisNode':
        return this.#walk((node as MathNode & { content: MathNode }).content, depth + 1);
      case 'ConstantNode':
        return this.#constant(node as ConstantNode, null);
      case 'SymbolNode':
        return this.#symbol((node as SymbolNode).name);
      case 'FunctionNode':
        return this.#call(node as FunctionNode, depth);
      case 'OperatorNode':
        return this.#operator(node as OperatorNode, depth);
      default:
        return this.#refuse(inWords.get(node.type) ?? node.type, '');
    }
  }

  /** A number, with the unit written behind it folded in decimally: `20 mV` is 20e-3 to the last bit. */
  #constant(node: ConstantNode, scale: UnitScale | null): Expression | null {
    const value: unknown = node.value;
    if (typeof value !== 'number') return this.#refuse(String(value), String(value));
    const scaled = scale === null ? value : Number(`${value}e${scale.decade}`);
    const folded = Number.isNaN(scaled) && scale !== null ? value * 10 ** scale.decade : scaled;
    if (!Number.isFinite(folded)) return this.#refuse('a number that is not finite', '');
    return { kind: 'number', value: folded, dimension: scale?.dimension ?? dimensionless };
  }

  #symbol(name: string): Expression | null {
    if (isQuantityName(name)) return { kind: 'quantity', name };
    const scale = unitScale(name);
    if (scale !== null)
      return { kind: 'number', value: Number(`1e${scale.decade}`), dimension: scale.dimension };
    const near = nearest(name, Object.keys(quantities));
    const fix = near === null ? 'rules/rule-deck.xsd lists the quantities' : `did you mean ${near}?`;
    this.#faults.push(
      fault('unknown-quantity', this.#offsetOf(name), 'a quantity of the design or a unit', name, fix),
    );
    return null;
  }

  #call(node: FunctionNode, depth: number): Expression | null {
    const callee: MathNode = node.fn as unknown as MathNode;
    const name = callee.type === 'SymbolNode' ? (callee as SymbolNode).name : null;
    if (name === null || !isFunctionName(name)) return this.#refuse(`a call of ${node.fn}`, name ?? '');
    const wanted = name === 'min' || name === 'max' ? 'two or more' : 'one';
    const fits = wanted === 'one' ? node.args.length === 1 : node.args.length >= 2;
    if (!fits) {
      const received = `${name} with ${node.args.length}`;
      this.#faults.push(
        fault('expression-arguments', this.#offsetOf(name), `${wanted} arguments`, received, 'mend the call'),
      );
      return null;
    }
    const of = node.args.map((argument) => this.#walk(argument, depth + 1));
    return of.every((argument) => argument !== null) ? { kind: 'call', name, of } : null;
  }

  #operator(node: OperatorNode, depth: number): Expression | null {
    const [first, second] = node.args as MathNode[];
    if (first === undefined) return this.#refuse(String(node.op), String(node.op));
    if (node.args.length === 1) return this.#prefix(node, first, depth);
    if (second === undefined) return this.#refuse(String(node.op), String(node.op));
    if (node.op === '*' && first.type === 'ConstantNode' && second.type === 'SymbolNode') {
      const scale = unitScale((second as SymbolNode).name);
      if (scale !== null) return this.#constant(first as ConstantNode, scale);
    }
    const shape = shapeOf(String(node.op));
    if (shape === null) return this.#refuse(String(node.op), String(node.op));
    const left = this.#walk(first, depth + 1);
    const right = this.#walk(second, depth + 1);
    return left === null || right === null ? null : ({ ...shape, left, right } as Expression);
  }

  #prefix(node: OperatorNode, operand: MathNode, depth: number): Expression | null {
    const name = String(node.fn);
    if (name !== 'unaryMinus' && name !== 'unaryPlus' && name !== 'not') {
      return this.#refuse(String(node.op), String(node.op));
    }
    const of = this.#walk(operand, depth + 1);
    if (of === null || name === 'unaryPlus') return of;
    return { kind: name === 'not' ? 'not' : 'negation', of };
  }

  #refuse(received: string, token: string): null {
    const offset = this.#offsetOf(token);
    const remedy = remedies.get(received);
    if (remedy === undefined) this.#faults.push(notAllowed(offset, received));
    else this.#faults.push(fault('expression-not-allowed', offset, '<= >= < or >', received, remedy));
    return null;
  }

  /** Parsed nodes carry no positions; the first place where the token stands is the best there is. */
  #offsetOf(token: string): number {
    if (!/^\w+$/.test(token)) return Math.max(0, this.#text.indexOf(token));
    return Math.max(0, this.#text.search(new RegExp(`\\b${token}\\b`)));
  }
}

/** What the library parses and the gate does not let through, as a person would call it. */
const inWords: ReadonlyMap<string, string> = new Map([
  ['AccessorNode', 'access to a property'],
  ['AssignmentNode', 'an assignment'],
  ['FunctionAssignmentNode', 'the definition of a function'],
  ['RelationalNode', 'a chain of comparisons'],
]);

const neverEqual = 'computed figures are never exactly equal: write <= or >=';
const remedies: ReadonlyMap<string, string> = new Map([
  ['==', neverEqual],
  ['!=', neverEqual],
  ['a chain of comparisons', 'compare once; a condition may join two comparisons with and'],
]);

function isFunctionName(name: string): name is FunctionName {
  return (functionNames as readonly string[]).includes(name);
}

type Shape =
  | { readonly kind: 'arithmetic'; readonly operator: Arithmetic }
  | { readonly kind: 'comparison'; readonly operator: Comparison }
  | { readonly kind: 'logic'; readonly operator: 'and' | 'or' };

function shapeOf(operator: string): Shape | null {
  if (arithmetic.has(operator)) return { kind: 'arithmetic', operator: operator as Arithmetic };
  if (comparisons.has(operator)) return { kind: 'comparison', operator: operator as Comparison };
  if (operator === 'and' || operator === 'or') return { kind: 'logic', operator };
  return null;
}
