// Everything that the kernel module offers to its host: functions over numbers only.
export { exp, log, pow } from './mathematics';
export { logFactorial } from './draws/factorial';
export { probeExpTwo, probePhilox, probePhiloxLanes, probeSample, probeStream } from './probe';
export { release, reserve } from './memory';
export {
  open,
  faultSubject,
  start,
  step,
  stepWeather,
  run,
  replicates,
  observed,
  stops,
  animals,
  slotNumbers,
  moved,
  laneBytes,
  saveLane,
  restoreLane,
  setBatchStep,
} from './lanes';
export { startPath, stepPath, stepPathUnder, pathAnimals, pathMoved } from './path/program';
export {
  openMany,
  manyInputs,
  manyGrowths,
  manyErrors,
  manyPeriods,
  manyRights,
  manyLefts,
  manyStarts,
  solveMany,
} from './many/many';
