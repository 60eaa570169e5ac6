// The one memory map of an image: read by the kernel (AssemblyScript) and by the compiler (TypeScript), so that both agree.
// Kinds, opcodes, uses and fault codes are never renumbered: a changed meaning raises the version.

export const imageMagic = 0x4e454b53; // 'SKEN' in little-endian bytes
export const imageMajor = 1;
export const imageMinor = 0;

/** Replicates that are run side by side. */
export const lanes = 16;
/** More animals than this in one replicate stop it. */
export const mostAnimals = 1000000000;

// Header: 256 bytes of i32 words, at these indices.
export const headerBytes = 256;
export const headerMagic = 0;
export const headerMajor = 1;
export const headerMinor = 2;
export const headerSize = 3;
export const headerPatches = 4;
export const headerClasses = 5;
export const headerSteps = 6;
export const headerSlots = 7;
export const headerSections = 8;
export const headerYearProgram = 9;
export const headerPhaseProgram = 10;
export const headerPatchKeys = 11;
export const headerClassKeys = 12;
export const headerStart = 13;
export const headerColumns = 14;
/** Ways of all dispersals together. */
export const headerWays = 15;
/** Numbers (f64) of each replicate that last from year to year beside its animals: weather and waits. */
export const headerWeather = 16;
/** Numbers (f64) of each replicate that the year program needs for work. */
export const headerWork = 17;

// Directory: one row of eight i32 a section, after the header. Rows are named by their index; none is -1.
export const rowWords = 8;
export const rowBytes = 32;
export const rowKind = 0;
export const rowId = 1;
export const rowType = 2;
export const rowCount = 3;
export const rowOffset = 4;
/** Entries of one epoch, or of one record. */
export const rowColumns = 5;
export const rowFlags = 6;
/** Row of the section that says which epoch holds in a step; -1 where there is one epoch. */
export const rowEpochOf = 7;
export const none = -1;
export const sectionAlignment = 16;

export const typeI32 = 1;
export const typeF64 = 2;
export const typeU8 = 3;

// Kinds of sections. P patches, C classes.
export const kindPatchKeys = 1; // i32, P
export const kindClassKeys = 2; // i32, C
export const kindStartAnimals = 3; // i32, P × C
export const kindYearProgram = 4; // i32, records
export const kindPhaseProgram = 5; // i32, records
export const kindEpochOf = 6; // i32, one a step
export const kindRates = 7; // f64, epochs × P × C
export const kindClassShares = 8; // f64, C
export const kindClassLinks = 9; // i32, C
export const kindClassMask = 10; // i32, C
export const kindPatchMatrices = 11; // f64, epochs × P × C × C, to × C + from
export const kindMovement = 12; // i32, epochs × movementWords: rows of the sections of one movement
export const kindMovementStart = 13; // i32, P + 1
export const kindMovementTo = 14; // i32, one an entry
export const kindMovementChance = 15; // f64, one an entry
export const kindMovementOnward = 16; // f64, chance of an entry given that no earlier entry was taken
export const kindAliasStart = 17; // i32, P + 1
export const kindAliasKeep = 18; // f64, chance to keep the first of the two ends of a column
export const kindAliasEnds = 19; // i32, two a column: entry of the movement, or -1 for death on the way
export const kindPatchNumbers = 20; // f64, P
export const kindPatchForms = 21; // i32, P
export const kindClassWeights = 22; // f64, C
export const kindSlotLists = 23; // i32, C + 1 starts (from the first list entry), then slots
export const kindOutcomeWeights = 24; // f64, rows × C: one an outcome, or as the rules say
export const kindOutcomePatches = 25; // i32, outcomes × P
export const kindNames = 26; // u8, JSON for printers; the kernel does not read it
export const kindOutcomeRules = 27; // i32, outcomes × ruleWords

export const highestKind = 27;

// 40-59 belong to chance. A factor is a matrix whose rows mix independent normals: starts, columns and weights stand in
// three rows of the directory, one after the other, and are named by the first.
export const kindColumnKeys = 40; // i32, one a column of a factor: hash of what its independent normals belong to
export const kindFactorStart = 41; // i32, rows + 1
export const kindFactorColumn = 42; // i32, one an entry
export const kindFactorWeight = 43; // f64, one an entry
export const kindCarry = 44; // f64: autocorrelation φ, and √(1 − φ²)
export const kindQuantities = 45; // i32, records of quantityWords
export const kindDistributions = 46; // f64, epochs × P × distributionNumbers
export const kindQuantileTables = 47; // f64, value and slope a node
export const kindExpression = 48; // i32, pairs: instruction and operand
export const kindConstants = 49; // f64
export const kindStrike = 50; // f64, strikeNumbers
export const kindPatchList = 51; // i32, patches or slots
export const kindSlotNumbers = 52; // f64, one a slot, or slots × P
export const firstChanceKind = 40;
export const lastChanceKind = 52;

// Sections of one movement, as words of a movement row.
export const movementWords = 6;
export const movementStart = 0;
export const movementTo = 1;
export const movementChance = 2;
export const movementOnward = 3;
export const movementAliasStart = 4;
export const movementAlias = 5; // row of the keep section; its ends stand in the next row

// Programs: records of sixteen i32.
export const recordWords = 16;
export const recordBytes = 64;
export const recordOpcode = 0;
/** Hash of the name of the phase or condition: a word of the counter of its random numbers. */
export const recordKey = 1;
/** Index of the phase in the model, or of the condition: for messages. */
export const recordIndex = 2;
/** First operand; the others follow. All operands are rows of the directory unless said otherwise. */
export const recordOperands = 3;

// Opcodes 1-31 belong to the spine of the year.
export const opBreeding = 1;
export const breedingBirths = 3; // rates
export const breedingInto = 4; // class shares
export const breedingOnward = 5; // class shares, each given that no earlier class was taken
export const breedingSlots = 6; // slot lists
export const breedingWaitCounted = 7; // class mask: of these no more than the capacity breed
export const breedingWaitCapacity = 8; // patch numbers
export const breedingOffspring = 9; // a number: one of those below; none for Poisson
export const breedingLitters = 10; // class weights: largest litter or size; or C rows of onward chances of 0, 1, 2, … young
export const breedingLitterMeans = 11; // class weights: mean of the row of chances
export const breedingMating = 12; // a number: one of those below; none where births need nobody else
export const breedingSexes = 13; // class weights: 1 for females that look for males, -1 for males that mate
export const breedingPerMale = 14; // patch numbers, one: females per male
export const breedingWaitRoom = 15; // slots that say how much of the capacity is left
export const offspringBinomial = 1;
export const offspringNegativeBinomial = 2;
export const offspringTable = 3;
export const matingHarmonic = 1;
export const matingMinimum = 2;
export const opSurvival = 2;
export const survivalRates = 3;
export const survivalSlots = 4;
export const opAgeing = 3;
export const ageingAdvance = 3; // class shares
export const ageingNext = 4; // class links
export const ageingByPatch = 5; // rates: shares by patch and class, in the place of those by class; or none
export const opDemography = 4;
export const demographyFates = 3; // patch matrices
export const demographyBirths = 4; // patch matrices
export const demographyFateSlots = 5;
export const demographyBirthSlots = 6;
export const opDispersal = 5;
export const dispersalMoves = 3; // class mask
export const dispersalLeaving = 4; // rates
export const dispersalMovement = 5; // movement
export const dispersalWays = 6; // a number: ways of the dispersals before this one
export const dispersalSlots = 7; // slot lists
export const opCeiling = 6;
export const ceilingCounted = 3; // class mask
export const ceilingCapacity = 4; // patch numbers
export const ceilingTakes = 5; // a number: one of those below; none for at random
export const ceilingRoom = 6; // slots that say how much of the capacity is left
export const takesYoungest = 1;
export const takesNobody = 2;
export const opCrowding = 7;
export const crowdingWeights = 3; // class weights
export const crowdingForms = 4; // patch forms
export const crowdingCoefficients = 5; // patch numbers
export const crowdingAlleeHalf = 6; // patch numbers
export const crowdingSlot = 7; // a slot, not a row
export const crowdingRoom = 9; // slots that say how much of the capacity is left
export const crowdingShape = 8; // patch numbers, one: the shape number s of a form that has one

// 32-63 belong to chance, 64-95 to plans, 96-127 to counts and outcomes.
export const opVariation = 32;
export const variationPatchColumns = 3; // column keys
export const variationPatchFactor = 4; // factor with P rows
export const variationRateColumns = 5; // column keys
export const variationRateFactor = 6; // factor with a row a quantity
export const variationCarry = 7;
export const variationQuantities = 8;
export const variationTables = 9; // quantile tables
export const variationWeather = 10; // a number: the first of its numbers in the weather, column by column
export const opResponse = 33;
export const responseExpression = 3;
export const responseConstants = 4;
export const responseAttributes = 5; // constants, attributes × P
export const responseYears = 6; // constants: the calendar year of each step, then each driver that follows the calendar, by step
export const responseBase = 7; // patch numbers, epochs × P: the value at the means; 0 where the rate is no such expression
export const responseSlot = 8; // a slot, not a row
export const responseBounds = 9; // a number: one of the bounds below
export const responsePatches = 10; // patch list
export const opCatastrophe = 34;
export const strikeChance = 3; // strike numbers
export const strikeOrigins = 4; // patch list
export const strikeReach = 5; // starts by origin, then in the next row the patches hit; none for everywhere
export const strikeSlots = 6; // slots (patch list without patches: i32)
export const strikeValues = 7; // f64, one a slot: its value where the catastrophe is on
export const strikeMeans = 8; // f64, slots × P: its mean over the years
export const strikeWeather = 9; // a number: the first of its numbers in the weather
export const strikeOver = 10; // a number: one of those below
export const strikeColumn = 11; // column keys: one, for the landscape
export const strikeCapacitySlots = 12; // a number: so many of the last slots hold as long as the capacity is lowered

export const opDrivers = 35;
export const driversValues = 3; // constants, drivers × given years
export const driversSlots = 4; // patch list: one slot a driver
export const driversColumn = 5; // column keys: one, for the landscape

export const strikeNumbers = 4;
export const strikeNumberChance = 0;
export const strikeNumberLasts = 1; // steps
export const strikeNumberWait = 2; // steps from one start to the next, at least
export const strikeNumberCapacity = 3; // steps
export const overPatches = 0;
export const overLandscape = 1;

export const quantityWords = 2;
export const quantitySlot = 0;
export const quantityDistributions = 1;

export const distributionNumbers = 4; // form, a, b, scale
export const distributionConstant = 0; // scale
export const distributionLognormal = 1; // scale · exp(a + b z)
export const distributionLogit = 2; // scale / (1 + exp(−a − b z))
export const distributionShareTable = 3; // scale · table from node a, b nodes a unit of z, held to 0 … 1
export const distributionPositiveTable = 4; // the same, held to 0 and above
/** Quantile tables reach from −tableReach to tableReach. */
export const tableReach = 9;

export const boundsShare = 1;
export const boundsPositive = 2;

// Instructions of an expression, on a stack of numbers a lane. Truths are 1 and 0.
export const doConstant = 1; // operand: which
export const doSlot = 2; // operand: slot
export const doAttribute = 3; // operand: which
export const doYear = 4;
export const doAdd = 5;
export const doSubtract = 6;
export const doMultiply = 7;
export const doDivide = 8;
export const doPower = 9;
export const doNegate = 10;
export const doMinimum = 11;
export const doMaximum = 12;
export const doExp = 13;
export const doLog = 14;
export const doSqrt = 15;
export const doLess = 16;
export const doAtMost = 17;
export const doEqual = 18;
export const doAnd = 19;
export const doOr = 20;
export const doNot = 21;
/** Of condition, then and otherwise, in this order on the stack. */
export const doChoose = 22;
/** Operand: which of the series by step; the calendar year is 0. */
export const doDated = 23;
/** Numbers that an expression may have on its stack. */
export const deepestStack = 64;

// 64-95 belong to what people do with animals. All three begin alike.
export const opTake = 64;
export const opMove = 65;
export const opAdd = 66;
export const handledActive = 3; // epoch of step: 1 in steps in which it is done; none for every step
export const handledColumn = 4; // a number: the first of three columns: animals handled, those of them that died, shortfall
export const handledPatches = 5; // patch forms: 1 where it is done
export const handledClasses = 6; // class mask
export const handledAmounts = 7; // rates: numbers or shares; of the group at its first patch, and class 0 where classes go together
export const handledRule = 8; // a number: one of the rules below
export const handledTogether = 9; // a number: 1 where all patches are one group
export const handledByClass = 10; // a number: 1 where each class is a group of its own
export const handledLevels = 11; // patch numbers: the count above which there is an excess
export const handledTo = 12; // a number: the patch that those moved enter
export const handledSurvival = 13; // class weights: of those moved or added, the share that survives
export const handledHoming = 14; // patch numbers, one: of those that survive being moved, the share that goes back; none for nobody
export const handledColumns = 3;
export const ruleNumber = 1;
export const ruleShare = 2;
export const ruleExcess = 3;

export const opCount = 96;
export const countOutcomeWeights = 3;
export const countOutcomePatches = 4;
export const countOutcomes = 5; // a number, not a row
export const countOutcomeRules = 6; // none where each outcome has one row of weights and sums its patches

// Of an outcome: its count is the smallest of its rows of weights, each over the patches as said.
export const ruleWords = 3;
export const ruleFirstWeights = 0;
export const ruleRows = 1;
export const ruleOver = 2;
export const overSum = 0;
export const overSmallest = 1;
export const overLargest = 2;

// Forms of crowding. N is the count, k the coefficient.
export const formNone = 0;
export const formBevertonHolt = 1; // 1 / (1 + k N)
export const formRicker = 2; // exp(-k N)
export const formCeiling = 3; // min(1, k / N)
export const formTheta = 4; // exp(-k N^s)
export const formHassell = 5; // (1 + k N)^-s

// Uses: what a class draws random numbers for within a phase.
export const useSurvive = 1;
export const useYoung = 2;
export const useInto = 3;
export const useAdvance = 4;
export const useFate = 5;
export const useBirth = 6;
export const useLeave = 7;
export const useTravel = 8;
export const useSpread = 9;
export const useCapacity = 10;
export const useRemove = 11;
export const useLitter = 12;
export const useUneven = 13;
export const useKept = 14;
export const useQuota = 15;
export const useTake = 16;
export const useHandling = 17;
export const useHoming = 18;
export const useWeather = 32;
export const useStrike = 33;
export const useOrigin = 34;
export const useDrivers = 35;

// Fault codes. 1-31: the image cannot be opened. 32-63: a replicate was stopped.
export const faultNone = 0;
export const faultMagic = 1;
export const faultMajor = 2;
export const faultSize = 3;
export const faultKind = 4;
export const faultOpcode = 5;
export const faultMemory = 6;
export const faultTooMany = 32;
