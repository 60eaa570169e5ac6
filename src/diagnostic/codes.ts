// Every kind of mistake that can be told, with what it means in one line. The mistakes in test/mistakes show each of them.
import { modelCodes } from './model-codes.ts';

/** What reading a text finds. */
const readingCodes = {
  // The file as text
  'file-empty': 'The file holds nothing.',
  'file-not-text': 'The file is not text in UTF-8.',
  'file-too-large': 'The file is too large to be a spec.',
  'many-mistakes': 'There are more mistakes than are told.',
  'yaml-nesting': 'Lists and sections are nested too deeply.',
  'yaml-syntax': 'The text is not YAML.',
  'yaml-tab': 'A tab indents a line.',
  'yaml-alias': 'Anchors and aliases are not part of the language.',
  'yaml-merge': 'Merge keys are not part of the language.',
  'yaml-tag': 'Tags are not part of the language.',
  'yaml-directive': 'Directives are not part of the language.',
  'yaml-documents': 'A file holds one spec, not several documents.',
  'yaml-key': 'A key is not a plain word.',
  'yaml-not-sections': 'The top of the file is not made of keys and values.',
  'duplicate-key': 'A key stands twice in the same section.',
  'comma-in-braces': 'A comma inside braces or square brackets cuts an expression.',
  'comment-in-name': 'A # may have cut a name.',
  'quote-word': 'Other YAML readers take the word for true, false or nothing.',

  // The shape of the spec
  'unknown-key': 'A key is not known here.',
  'unknown-kind': 'A section of the author’s own has a kind that does not exist.',
  'missing-kind': 'A section of the author’s own does not say its kind.',
  'near-key': 'A name of the author’s own is nearly a key of the language.',
  'missing-key': 'A key that is needed is missing.',
  'missing-value': 'A key has no value.',
  'wrong-type': 'A value is of another sort than the key takes.',
  'unknown-word': 'A word is not one of those that the key takes.',
  'out-of-range': 'A number is outside the limits of the key.',
  'wrong-length': 'A list has too few or too many items.',
  'repeated-item': 'An item stands twice in a list.',
  'needs-quotes': 'A name looks like a number or like true, false or nothing.',
  'number-format': 'A number is written in a way that other readers take for text.',
  'relative-change': 'A plus in front of a number.',
  'unusable-name': 'A name cannot be used.',

  // Data files
  'data-missing': 'A file that the spec names cannot be read.',
  'data-syntax': 'A data file is not in the format that it should be in.',
  'geojson-shape': 'A GeoJSON file or feature is of another sort than a patch can be.',
  'geojson-crs': 'A GeoJSON file says that its places are something else than the spec says.',
  'nameless-feature': 'A feature has no name.',
  'open-ring': 'A ring of a polygon does not end where it begins.',
  'left-out-property': 'A property of a feature is not used.',
  'csv-column': 'A column of a table is missing, unknown or stands twice.',
  'csv-row': 'A row of a table is not whole.',
  'csv-repeated': 'Two places give a number for the same thing.',

  // Expressions and quantities
  'expression-empty': 'An expression holds nothing.',
  'expression-character': 'A character has no meaning in an expression.',
  'expression-syntax': 'An expression does not go on as it must.',
  'expression-function': 'A function does not exist or has the wrong number of arguments.',
  'expression-truth': 'A condition stands where a number is needed, or the other way round.',
  'expression-size': 'An expression is too long or nested too deeply.',
  'division-by-zero': 'An expression divides by zero.',
  'not-a-number': 'An expression has no value.',
  'infinite-number': 'An expression is too large to be a number.',
  'wrong-unit': 'A quantity has a unit that the key does not take.',
} as const satisfies Readonly<Record<string, string>>;

export const diagnosticCodes = { ...readingCodes, ...modelCodes } as const;

export type DiagnosticCode = keyof typeof diagnosticCodes;
