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
export const kindOutcomeWeights = 24; // f64, outcomes × C
export const kindOutcomePatches = 25; // i32, outcomes × P
export const kindNames = 26; // u8, JSON for printers; the kernel does not read it

export const highestKind = 26;

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
export const opSurvival = 2;
export const survivalRates = 3;
export const survivalSlots = 4;
export const opAgeing = 3;
export const ageingAdvance = 3; // class shares
export const ageingNext = 4; // class links
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
export const opCeiling = 6;
export const ceilingCounted = 3; // class mask
export const ceilingCapacity = 4; // patch numbers
export const ceilingTakes = 5; // a number: one of those below; none for at random
export const takesYoungest = 1;
export const takesNobody = 2;
export const opCrowding = 7;
export const crowdingWeights = 3; // class weights
export const crowdingForms = 4; // patch forms
export const crowdingCoefficients = 5; // patch numbers
export const crowdingAlleeHalf = 6; // patch numbers
export const crowdingSlot = 7; // a slot, not a row
export const crowdingShape = 8; // patch numbers, one: the shape number s of a form that has one

// 32-63 belong to chance, 64-95 to plans, 96-127 to counts and outcomes.
export const opCount = 96;
export const countOutcomeWeights = 3;
export const countOutcomePatches = 4;
export const countOutcomes = 5; // a number, not a row

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

// Fault codes. 1-31: the image cannot be opened. 32-63: a replicate was stopped.
export const faultNone = 0;
export const faultMagic = 1;
export const faultMajor = 2;
export const faultSize = 3;
export const faultKind = 4;
export const faultOpcode = 5;
export const faultMemory = 6;
export const faultTooMany = 32;
