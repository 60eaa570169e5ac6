// The mistakes that only show when names are resolved and numbers are known.

export const modelCodes = {
  // Names
  'unknown-class': 'A name is not one of the classes.',
  'unknown-patch': 'A name is not one of the patches.',
  'unknown-phase': 'A name in the year is not a phase.',
  'unknown-name': 'A name in an expression is not known.',
  'unknown-rate': 'A condition names a rate that does not exist.',
  'ambiguous-name': 'A name stands for two things.',
  'reserved-name': 'A name has a meaning of its own in the language.',
  'parameter-cycle': 'A parameter is made from itself.',
  'repeated-patch': 'Two patches have the same name.',

  // Time
  'not-a-year': 'A key that should be a calendar year is none.',
  'driver-years': 'A driver has no value for a year of the model.',
  'fixed-in-time': 'A number that cannot change with time depends on the year.',

  // The year
  'missing-count': 'The year does not say when animals are counted.',
  'repeated-phase': 'A phase stands twice in the year.',
  'missing-rates': 'A phase is in the year, but its rates are not given.',
  'unused-rates': 'Rates are given for a phase that is not in the year.',
  'stage-duration': 'A stage has no duration that can be.',
  'missing-oldest': 'It is not said what happens to the oldest class.',

  // Rates
  'missing-rate': 'A class has no rate.',
  'share-out-of-range': 'A share is below 0 or above 1.',
  'negative-rate': 'A rate is below zero.',
  'matrix-size': 'A matrix has another size than the classes ask for.',
  'column-above-one': 'The fates of one class add up to more than 1.',

  'offspring-shape': 'A distribution of young says too little or too much, or cannot have these births.',
  'sexes-shape': 'What is said of the two sexes is missing or does not fit.',

  // Places and dispersal
  'missing-position': 'It is not said what the places of the patches mean.',
  'not-degrees': 'A place cannot be longitude and latitude.',
  'plane-degrees': 'Places on a plane look like degrees.',
  'outline-ring': 'A ring of an outline has no inside, or is a hole outside its polygon.',
  'self-crossing': 'An outline crosses itself.',
  'area-differs': 'The area that is given is not that of the outline.',
  'missing-place': 'A patch has no place, and a distance is needed.',
  'same-place': 'Two patches lie at the same place.',
  'missing-area': 'A patch has no area, and one is needed.',
  'dispersal-shape': 'A dispersal says too little or too much.',
  'shares-above-one': 'More animals leave a patch than there are.',
  'self-share': 'A share goes from a patch to itself.',
  'no-target': 'Leavers of a patch have nowhere to go.',
  'misses-above-one': 'More leavers arrive than set out.',

  // Crowding
  'crowding-shape': 'A crowding says too little or too much.',
  'ceiling-without-breeding': 'A surplus waits to breed in a year without a breeding.',
  'missing-capacity': 'A patch has no capacity above zero.',
  'declining-patch': 'A patch declines alone, so it has no capacity to stand still at.',
  'capacity-unreachable': 'No strength of crowding makes a patch stand still at its capacity.',
  'uncounted-capacity': 'The crowding counts nobody at its place in the year.',

  // Chance
  'nothing-varies': 'Variation is asked for, but nothing varies.',
  'unknown-varied': 'A correlation is of a name that does not vary.',
  'impossible-variation': 'No distribution has this mean and this SD.',
  'varied-twice': 'A rate varies by itself and through a parameter.',
  'varies-elsewhere': 'A parameter that varies stands where numbers cannot vary.',
  'missing-correlation': 'It is not said how alike the years are in different patches.',
  'impossible-correlation': 'Numbers cannot be correlated like this.',
  'impossible-uncertainty': 'No distribution is as uncertain as this.',
  'idle-catastrophe': 'A catastrophe changes nothing.',
  'repaired-correlation': 'A table of correlations was moved to the nearest possible one.',

  // What people do with animals
  'handling-shape': 'A take, a move or a release says too little or too much.',
  'nobody-there': 'Animals are looked for, or brought, where and when there can be none.',
  'year-outside': 'Something is to be done in years that are not looked at.',

  // Plans
  'plan-shape': 'An action says too little or too much.',
  'unknown-action': 'A scenario names an action that does not exist.',
  'unknown-scenario': 'There is no scenario of this name.',
  'contradicting-sets': 'Two actions of a scenario set one thing in the same year.',
  'missing-currency': 'Costs are given, but no currency.',
  'empty-scenario': 'A scenario has no action.',
  'unused-action': 'No scenario names an action.',

  // Sweeps
  'unknown-number': 'A sweep is over a number that the model does not have.',
  'sweep-range': 'The values of a number in a sweep cannot be.',
  'sweep-shape': 'A sweep says too little or too much.',
  'sweep-size': 'A sweep is larger than can be done.',

  // What a careful reader asks of a model without a mistake
  'births-of-both-sexes': 'Births of both sexes may be counted as females.',
  'newborn-unsurvived': 'Young reach the next class before any survival.',
  'birthday-dispersal': 'Young set out on the day they are born.',
  'overlapping-patches': 'Patches lie over each other.',
  'sampling-spread': 'A spread between years may hold the error of measuring.',
  'too-long-lived': 'Animals of the oldest class live longer than is known of any.',
  'too-fast-growth': 'A patch grows faster than its life history can.',
  'apparent-survival': 'A survival from marked animals stands beside emigration.',
  'fast-stage': 'Animals pass a stage faster than its duration lets them.',
  'life-cycle': 'The life cycle falls into parts, or keeps swinging.',
  'long-horizon': 'The model looks further ahead than its counts reach back.',

  // Start and outcomes
  'start-empty-class': 'The start has animals of a class that is always empty at the count.',
  'start-needs-spread': 'A stable spread does not exist here.',
  'rare-shape': 'Splitting is asked for where it does not hold.',
  'precision-shape': 'A run is to be precise in a way that cannot be.',
  'start-nobody': 'The start has no animals.',
  'already-so': 'An outcome is so from the start, or can never be.',
  'outcome-shape': 'An outcome says too little or too much.',
} as const satisfies Readonly<Record<string, string>>;
