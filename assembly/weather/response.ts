// A rate that is an expression over named numbers which vary: the expression is worked out anew for each patch and lane, and
// its slot says how much of its value at the means it has.
import { f64At, i32At } from '../arrays';
import { calendar, laneNumbers, slotValues, work } from '../batch';
import { entries, operand, patches, section, sectionAt, steps } from '../image';
import * as layout from '../layout';
import { exp, log, pow } from '../mathematics';

let constants: usize = 0;
let attributes: usize = 0;
/** Series by step. */
let dated: usize = 0;
let patch: i32 = 0;

export function respond(record: usize): void {
  const expression = operand(record, layout.responseExpression);
  const base = sectionAt(operand(record, layout.responseBase), calendar);
  const slot = operand(record, layout.responseSlot);
  const share = operand(record, layout.responseBounds) === layout.boundsShare;
  constants = section(operand(record, layout.responseConstants));
  attributes = section(operand(record, layout.responseAttributes));
  dated = section(operand(record, layout.responseYears));
  const list = operand(record, layout.responsePatches);
  for (let i = 0; i < entries(list); i++) {
    patch = i32At(section(list), i);
    const target = slotValues + <usize>(slot * patches + patch) * laneNumbers;
    const mean = f64At(base, patch);
    if (mean !== 0) evaluate(section(expression), entries(expression));
    for (let at: usize = 0; at < laneNumbers; at += 8) {
      const value = load<f64>(work + at);
      // What has no value counts as 0: the compiler has looked where that could be.
      const low: f64 = value > 0 ? value : 0;
      store<f64>(target + at, mean === 0 ? 1 : (share && low > 1 ? 1 : low) / mean);
    }
  }
}

/** Leaves the value at the bottom of the stack, which is `work`. */
function evaluate(expression: usize, words: i32): void {
  let top = work - laneNumbers;
  for (let word = 0; word < words; word += 2) {
    const what = i32At(expression, word);
    const which = i32At(expression, word + 1);
    if (what <= layout.doYear || what === layout.doDated) {
      top += laneNumbers;
      push(top, what, which);
    } else if (what === layout.doChoose) {
      top -= 2 * laneNumbers;
      choose(top);
    } else if (isUnary(what)) {
      for (let at = top; at < top + laneNumbers; at += 8) store<f64>(at, unary(what, load<f64>(at)));
    } else {
      top -= laneNumbers;
      for (let at = top; at < top + laneNumbers; at += 8) {
        store<f64>(at, binary(what, load<f64>(at), load<f64>(at, 128)));
      }
    }
  }
}

function push(target: usize, what: i32, which: i32): void {
  if (what === layout.doSlot) {
    memory.copy(target, slotValues + <usize>(which * patches + patch) * laneNumbers, laneNumbers);
    return;
  }
  let value: f64 = 0;
  if (what === layout.doConstant) value = f64At(constants, which);
  else if (what === layout.doAttribute) value = f64At(attributes, which * patches + patch);
  else value = f64At(dated, (what === layout.doYear ? 0 : which * steps) + calendar - 1);
  for (let at = target; at < target + laneNumbers; at += 8) store<f64>(at, value);
}

function choose(target: usize): void {
  for (let at = target; at < target + laneNumbers; at += 8) {
    store<f64>(at, load<f64>(at) !== 0 ? load<f64>(at, 128) : load<f64>(at, 256));
  }
}

function isUnary(what: i32): bool {
  return (
    what === layout.doNegate ||
    what === layout.doExp ||
    what === layout.doLog ||
    what === layout.doSqrt ||
    what === layout.doNot
  );
}

function unary(what: i32, x: f64): f64 {
  if (what === layout.doNegate) return -x;
  if (what === layout.doExp) return exp(x);
  if (what === layout.doLog) return log(x);
  if (what === layout.doSqrt) return sqrt<f64>(x);
  return x !== 0 ? 0 : 1;
}

function binary(what: i32, x: f64, y: f64): f64 {
  switch (what) {
    case layout.doAdd:
      return x + y;
    case layout.doSubtract:
      return x - y;
    case layout.doMultiply:
      return x * y;
    case layout.doDivide:
      return x / y;
    case layout.doPower:
      return pow(x, y);
    case layout.doMinimum:
      return min<f64>(x, y);
    case layout.doMaximum:
      return max<f64>(x, y);
    case layout.doLess:
      return x < y ? 1 : 0;
    case layout.doAtMost:
      return x <= y ? 1 : 0;
    case layout.doEqual:
      return x === y ? 1 : 0;
    case layout.doAnd:
      return x !== 0 && y !== 0 ? 1 : 0;
    default:
      return x !== 0 || y !== 0 ? 1 : 0;
  }
}
