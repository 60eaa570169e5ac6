// Litters that are not Poisson: the young of all animals of a cell at once, exactly as the sum over single animals.
import { f64At, u32At } from '../arrays';
import { laneNumbers, numbers, rates, words } from '../batch';
import { binomial } from '../draws/binomial';
import { gamma } from '../draws/gamma';
import { poisson } from '../draws/poisson';
import { streamOf, substreamOf } from '../draws/stream';
import { classes, entries, operand, section } from '../image';
import * as layout from '../layout';

/** A stream of litters and of what follows them. */
let litter: u64 = 0;
let uneven: u64 = 0;
let kept: u64 = 0;

/** numbers[lane] += the young of the animals in a cell of class c, whose mean for one animal stands in rates[lane]. */
export function addLitters(record: usize, c: i32, cell: usize, classKey: u32): void {
  litter = streamOf(classKey, layout.useLitter);
  uneven = streamOf(classKey, layout.useUneven);
  kept = streamOf(classKey, layout.useKept);
  const kind = operand(record, layout.breedingOffspring);
  const row = operand(record, layout.breedingLitters);
  const table = section(row);
  for (let lane = 0; lane < layout.lanes; lane++) {
    const n = u32At(cell, lane);
    const mean = f64At(rates, lane);
    if (n === 0 || mean <= 0) continue;
    const at = words + ((<usize>lane) << 3);
    const w0 = load<u64>(at);
    const w1 = load<u64>(at, laneNumbers);
    let young: f64 = 0;
    if (f64(n) * mean > layout.mostAnimals) young = f64(n) * mean;
    else if (kind === layout.offspringBinomial) young = ofBinomial(n, mean, f64At(table, c), w0, w1);
    else if (kind === layout.offspringNegativeBinomial) young = ofNegativeBinomial(n, mean, f64At(table, c), w0, w1);
    else {
      const width = entries(row) / classes;
      const whole = f64At(section(operand(record, layout.breedingLitterMeans)), c);
      const all = ofTable(n, table + ((<usize>(c * width)) << 3), width, w0, w1);
      young = keepShare(all, mean / whole, w0, w1);
    }
    store<f64>(numbers + ((<usize>lane) << 3), f64At(numbers, lane) + young);
  }
}

/** Each animal has so many chances of mean / largest; what exceeds the kernel's numbers is drawn as Poisson of the same mean. */
function ofBinomial(n: u32, mean: f64, largest: f64, w0: u64, w1: u64): f64 {
  const chances = f64(n) * largest;
  if (chances > 4000000000) return poisson(f64(n) * mean, w0, w1, litter);
  return f64(binomial(u32(chances), min<f64>(1, mean / largest), w0, w1, litter));
}

/** A Poisson number around a gamma number: the sum over n animals has size n k. */
function ofNegativeBinomial(n: u32, mean: f64, size: f64, w0: u64, w1: u64): f64 {
  const around = (gamma(f64(n) * size, w0, w1, uneven) * mean) / size;
  return poisson(around, w0, w1, litter);
}

/** How many animals have no, one, two, … young, by conditional binomials. */
function ofTable(n: u32, onward: usize, width: i32, w0: u64, w1: u64): f64 {
  let young: f64 = 0;
  let left = n;
  for (let k = 0; k < width && left !== 0; k++) {
    const have = binomial(left, f64At(onward, k), w0, w1, substreamOf(litter, k));
    young += f64(k) * f64(have);
    left -= have;
  }
  return young;
}

/** Young of whom each counts so often on average: a share that lives, or whole copies and a share. */
function keepShare(all: f64, share: f64, w0: u64, w1: u64): f64 {
  if (share === 1) return all;
  const whole = floor<f64>(share);
  if (all > layout.mostAnimals) return all * share;
  return all * whole + f64(binomial(u32(all), share - whole, w0, w1, kept));
}
