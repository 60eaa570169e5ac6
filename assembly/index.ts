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
  stepUnder,
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
  weatherNumbers,
} from './lanes';
export { openPath, pathAnimals, readPath, writePath, openCourses, courseTotals } from './path/state';
export { startPath, rewindPath, stepPath, stepCourses } from './path/program';
export { startCourses, fillCourses, holdCourses, sumCourses, scaleCourses } from './path/courses';
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
export {
  reserveAlike,
  openAlike,
  alikeProgram,
  alikeNumbers,
  alikeValues,
  alikeGrowths,
  solveAlike,
} from './alike/alike';
export { openLines, linePowers, lineCells, lineText, writeLines } from './text/lines';
