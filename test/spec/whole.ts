// A spec that uses every key of the language (an invented case).
export const wholeText = `skein: 1
study:
  title: Reed hare on the Harrow Levels
  question: "Which of two plans: hedge, or none?"
  by: Fen office
  for: Harrow water board
  date: 2026-03-01
  status: draft
  invented: true
first-year: 2027
years: 50
step: 1 year
position: plane
unit: km
patches:
  - { name: North fen, at: [3.2, 9.1], area: 140 ha, capacity: 260, cover: 0.4, outline: [[[[2, 8], [4, 8], [4, 10]]]] }
  - name: Saltmarsh
    at: [-1e1, .5]
    capacity: 0
counts: females
classes: [newborn, yearling, adult]
oldest: open-ended
duration: { newborn: { years: 1, as: geometric }, yearling: { years: 2 * 2, as: fixed } }
parameters:
  adult_survival:
    value: 0.74
    source: { text: "radio-tracking 2019-2024, 61 hares", basis: measured here }
  litter: { value: 4.6, uncertainty: { standard-error: 0.4, interval: [4, 5], uniform: [4, 5], triangular: [4, 5], as: positive number } }
  natal_leaving: 22 %
survival: { newborn: 0.38, yearling: 0.62, adult: adult_survival }
births: { yearling: 0.4 * litter, adult: litter, female-share: 0.5, into: newborn }
demography: { fates: [[0, 0, 0], [0.3, 0, 0], [0, "min(0.5, cover)", 0.8]] }
in:
  Saltmarsh: { survival: { adult: adult_survival * 0.9 }, births: { adult: 2 } }
  North fen: { moult: { adult: 0.95 }, natal: { newborn: 0.3 }, demography: { survival: [0.3, 0.4, 0.8], fecundity: [0, 1, 1.2] } }
year: [count, breeding, second brood, survival, moult, natal, roaming, wandering, room, ageing]
natal:
  kind: dispersal
  classes: [newborn]
  leaving: natal_leaving
  distance: straight
  distance-between: nearest edges
  kernel: { shape: exponential, mean: 4 km, reach: 25000 m }
  attraction: capacity ^ 0.5
  leavers: all arrive
  hazard: 0.03 per km
roaming:
  kind: dispersal
  classes: all
  leaving: { adult: 0.1 }
  survival-on-the-way: if year > 2030 then 0.9 else 0.8
  shares: { North fen: { Saltmarsh: 0.1 } }
room: { kind: ceiling, counted: [adult], capacity: 2 * capacity, takes: at random }
crowding:
  form: beverton-holt
  changes: { survival: [newborn] }
  counted: { yearling: 1, adult: 0.5 }
  capacity: capacity
  allee-half: 4
  where-declining: { as: North fen }
start: { counted: { North fen: 120 }, of: [yearling, adult], rest: stable within patch }
outcomes:
  lost hares: { of: [adult], below: 40 }
  north empty: { of: all, in: [North fen], below: 0.5 }
  recovered: { of: { yearling: 0.5, adult: 1 }, counted: in each patch, above: 20, for: 5 years }
  halved: { of: [adult], fallen-by: 50 % }
  alone: { of: all, lacking: one sex }
observed: { counts: { North fen: { 2024: 71, 2025: 64 } }, of: [adult], error: 15 % }
drivers: { values: { rain: { 2027: 0.8, 2028: 1.1 } }, future: repeat }
run: { replicates: 2000, seed: 2026, draws: 200 }
variation:
  survival: { newborn: { sd: 0.1 }, adult: { cv: 5 %, shape: beta } }
  litter: { sd: 0.7, shape: gamma }
  between-rates: { survival of adult: { litter: 0.4 } }
  between-patches: { range: 20 km }
  autocorrelation: 0.2
bag: { kind: take, classes: [adult], share-of-excess: 0.25, over: 200, counted: each patch, in: [North fen, Saltmarsh], years: { from: 2030, until: 2035 } }
moves: { kind: move, from: North fen, to: Saltmarsh, number: { adult: 6 }, handling-survival: 0.95, first-year-survival: 0.8, years: [2028] }
release: { kind: add, in: Saltmarsh, number: { yearling: 4 } }
mates: { kind: crowding, form: allee, changes: { moult: all }, counted: all, allee-half: 3 }
second brood: { kind: breeding, births: { adult: 0.5, female-share: 0.5, into: newborn }, offspring: { distribution: bernoulli } }
late brood: { kind: breeding, births: { into: newborn }, offspring: { distribution: table of chances, chances: { adult: [0.5, 0.5] } } }
offspring: { distribution: binomial, largest-litter: 6 }
mating: { form: minimum, males: [adult], females: all, females-per-male: 4 }
moult: { kind: survival, survival: { newborn: 1, yearling: 0.98, adult: 0.97 } }
wandering:
  kind: dispersal
  classes: [yearling]
  leaving: 0.1
  kernel: { shape: 2Dt, scale: 3 km, shape-number: 2.5 }
  leavers: may miss
  links:
    - { between: [North fen, Saltmarsh], distance: 9 km, crossing-death: 0.4, turn-back: 50 % }
uncertainty:
  correlations: { adult_survival: { litter: 0.3 } }
  draws: [{ litter: 4 }, { litter: 5 }]
flood:
  kind: catastrophe
  chance: 0.04 per patch
  reach: { radius: 8 km }
  begins-in: [Saltmarsh]
  multiplies: { survival: { newborn: 0.3 }, births: { adult: 1.2 } }
  takes: { adult: 0.5 }
  capacity: { times: 0.4, for: 5 years }
  lasts: 2 years
  wait: 10 years
money: { currency: crowns, price-year: 2026, discount: 3 % }
actions:
  hedgerow: { kind: link, between: [North fen, Saltmarsh], dispersal: wandering, crossing-death: { set: 0.12 }, turn-back: { times: 0.5 }, distance: { set: { value: 4 km, uncertainty: { standard-error: 0.3 } } }, share: { add: 0.05 }, from: 2029, cost: { once: 120000, yearly: 3000, per-km: 20000 } }
  hunt: { kind: take, classes: [adult], share-of-excess: { value: 0.25, uncertainty: { uniform: [0.2, 0.3] } }, over: 200, counted: each patch, before: breeding }
  rescue: { kind: move, from: North fen, to: Saltmarsh, number: { adult: { value: 6, uncertainty: { interval: [4, 8] }, source: { basis: expert } } }, after: natal, years: [2028], homing: 0.1, cost: { per-animal: [800, 900] } }
  bred: { kind: add, in: Saltmarsh, number: { yearling: 4 }, first-year-survival: { value: 0.5, uncertainty: { triangular: [0.3, 0.7] } }, after: natal }
  rewet: { kind: habitat, in: Saltmarsh, capacity: { add: { value: 80, uncertainty: { standard-error: 20, as: positive number } } }, area: { times: 1.2 }, quality: { cover: { set: 0.8 } }, from: 2028, over: 8 years }
  mere: { kind: habitat, new: { name: New mere, at: [11.8, 8.4], area: 60 ha, capacity: 40 }, like: Saltmarsh, from: 2031 }
  drained: { kind: habitat, in: Saltmarsh, lost: true, from: 2040 }
  mowing: { kind: change, parameters: { litter: { times: 1.1 } }, rates: { survival: { newborn: { times: { value: 1.05, uncertainty: { interval: [0.99, 1.11] } } } } }, until: 2040 }
scenarios:
  all of it: [hedgerow, hunt, rescue, bred, rewet, mere, mowing]
  drained: [drained]
`;
