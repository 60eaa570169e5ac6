// skein schema: the JSON Schema of something that skein reads, prints or writes.
import { formatNames, schemaText } from '../../formats/schemas.ts';
import { Ending, exitCodes } from '../exit.ts';
import { writeOut } from '../output.ts';

export function printSchema(name: string): void {
  const text = schemaText(name);
  if (text === null) {
    throw new Ending(exitCodes.usage, `There is no schema \`${name}\`. There are: ${formatNames.join(', ')}.`);
  }
  writeOut(text);
}
