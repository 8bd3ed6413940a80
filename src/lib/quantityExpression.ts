import {
  addDependencies,
  cosDependencies,
  create,
  createUnitDependencies,
  divideDependencies,
  multiplyDependencies,
  parseDependencies,
  piDependencies,
  powDependencies,
  sinDependencies,
  sqrtDependencies,
  subtractDependencies,
  tanDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
  type FactoryFunctionMap,
  type MathNode,
  type Unit,
} from 'mathjs';
import { displayUnit, MATHJS_UNITS, type UnitSystem } from '#shared/units/displayUnits.ts';
import type { QuantityKind } from '#shared/units/quantities.ts';
import { QUANTITY_NAMES } from './quantityNames.ts';

/** What an input has understood: the SI value, or what is wrong with the text. */
export type Reading = { ok: true; value: number } | { ok: false; message: string };

// Only what reading a quantity takes, which also keeps the chunk small.
const FACTORIES = [
  addDependencies,
  cosDependencies,
  createUnitDependencies,
  divideDependencies,
  multiplyDependencies,
  parseDependencies,
  piDependencies,
  powDependencies,
  sinDependencies,
  sqrtDependencies,
  subtractDependencies,
  tanDependencies,
  unaryMinusDependencies,
  unaryPlusDependencies,
  unitDependencies,
];
const math = create(
  FACTORIES.reduce<FactoryFunctionMap>((sum, factories) => ({ ...sum, ...factories }), {}),
);
for (const [name, definition] of Object.entries(MATHJS_UNITS)) math.createUnit(name, definition);

const OPERATORS = new Set(['+', '-', '*', '/', '^']);
const FUNCTIONS = new Set(['sqrt', 'sin', 'cos', 'tan']);
const CONSTANTS = new Set(['pi']);
/** Longer than any dimension anybody writes; keeps a pasted page from being parsed. */
const LONGEST = 200;

/** Drops the rounding of unit conversion, so that 12 in is stored as 0.3048 m; far below any tolerance. */
const KEPT_DIGITS = 14;

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

class Refusal extends Error {}

/**
 * Reads a quantity as people write it: `450`, `2*450 mm + 1/2 in`, `3' 4"`, `80 kN/mm`. A number without a
 * unit is in the unit shown for `kind` in `system`. Lazily loaded, since mathjs is large.
 */
export function readQuantity(text: string, kind: QuantityKind, system: UnitSystem): Reading {
  const shown = displayUnit(kind, system);
  if (text.trim() === '') return refuse(`Enter ${QUANTITY_NAMES[kind]}${exampleOf(shown.symbol)}.`);
  if (text.length > LONGEST) return refuse(`Use at most ${LONGEST} characters.`);
  try {
    const node = math.parse(inMathjsTerms(text));
    node.traverse(checkNode);
    const converted = inSi(node.compile().evaluate() as unknown, kind, shown);
    const value = Number(converted.toPrecision(KEPT_DIGITS));
    return Number.isFinite(value) ? { ok: true, value } : refuse('This gives no finite number.');
  } catch (error) {
    return refuse(explain(error));
  }
}

const refuse = (message: string): Reading => ({ ok: false, message });

const exampleOf = (symbol: string): string => (symbol === '' ? '' : `, such as 450 ${symbol}`);

/** Signs of the trade in the terms of mathjs, where `in` is an operator and ' a transposition. */
function inMathjsTerms(text: string): string {
  return text
    .replaceAll('−', '-')
    .replaceAll(/[×·⋅]/g, '*')
    .replaceAll('÷', '/')
    .replaceAll(/°/g, ' deg')
    .replaceAll(/["″]/g, ' inch ')
    .replaceAll(/['′]/g, ' ft + ')
    .replace(/\+\s*$/, '')
    .replaceAll(/\bin\b/g, 'inch')
    .replaceAll(/⁻?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/g, (raised) => {
      const digits = [...raised].map((c) => (c === '⁻' ? '-' : SUPERSCRIPTS.indexOf(c))).join('');
      return `^(${digits})`;
    });
}

/** Arithmetic and units only: no assignments, functions of other kinds, strings or indexing. */
function checkNode(node: MathNode): void {
  if (math.isConstantNode(node)) {
    if (typeof node.value !== 'number')
      throw new Refusal('Only numbers and units can be used here.');
    return;
  }
  if (math.isParenthesisNode(node)) return;
  if (math.isOperatorNode(node)) {
    if (!OPERATORS.has(node.op)) throw new Refusal(`“${node.op}” can’t be used here.`);
    return;
  }
  if (math.isFunctionNode(node)) {
    if (!FUNCTIONS.has(node.fn.name)) throw new Refusal(`“${node.fn.name}” can’t be used here.`);
    return;
  }
  if (math.isSymbolNode(node)) {
    const known =
      FUNCTIONS.has(node.name) || CONSTANTS.has(node.name) || math.Unit.isValuelessUnit(node.name);
    if (!known) throw new Refusal(`“${node.name}” is no unit known here.`);
    return;
  }
  throw new Refusal('Only numbers, + − × ÷ ^, brackets and units can be used here.');
}

function inSi(
  result: unknown,
  kind: QuantityKind,
  shown: { factor: number; symbol: string; mathjsName: string },
): number {
  if (typeof result === 'number') return result * shown.factor;
  if (!math.isUnit(result)) throw new Refusal('This gives no number.');
  if (shown.mathjsName !== '') {
    const wanted = math.unit(1, shown.mathjsName);
    // An angle is a pure ratio in SI: N·m stands for N·m/rad as well.
    for (const given of [result, math.divide(result, math.unit(1, 'rad')) as Unit]) {
      if (given.equalBase(wanted)) return given.toNumber(shown.mathjsName) * shown.factor;
    }
  }
  const unit = shown.symbol === '' ? 'a number without a unit' : `in ${shown.symbol} or the like`;
  throw new Refusal(`Here ${QUANTITY_NAMES[kind]} is wanted, ${unit}.`);
}

function explain(error: unknown): string {
  if (error instanceof Refusal) return error.message;
  if (error instanceof Error && /units? do not match|unexpected type/i.test(error.message)) {
    return 'The parts of a sum must be of one kind: give each a unit, or none.';
  }
  return 'This can’t be read. Write it like 2*450 mm + 1/2 in, with a point before decimals.';
}
