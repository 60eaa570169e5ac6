// How much is read: whatever a text holds, reading it takes no more than a second or two.

export const mostCharacters = 4_000_000;
/** Words and marks of YAML, blanks not counted: about 7,000 patches written out with five values each. */
export const mostMarks = 100_000;
/** Blanks, line ends and comments counted too. */
export const mostTokens = 300_000;
/** Sections and lists within each other. */
export const deepest = 32;
