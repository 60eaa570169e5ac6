// What the terminal can show: colours and how wide.
import { fstatSync } from 'node:fs';

export interface Terminal {
  readonly colour: boolean;
  readonly width: number;
}

const widthOfPages = 100;
const descriptors = { stdout: 1, stderr: 2 } as const;

/** Of standard output or standard error. What is no device is told apart here, since Node opens a stream of sockets to say so. */
export function terminalAt(name: keyof typeof descriptors): Terminal {
  return isDevice(descriptors[name]) ? terminalOf(process[name]) : { colour: false, width: widthOfPages };
}

/** Of the stream that text goes to. NO_COLOR and pipes turn colours off. */
export function terminalOf(stream: NodeJS.WriteStream): Terminal {
  // Of a pipe it is not false but missing.
  const terminal = stream.isTTY === true;
  const colour = terminal && (process.env['NO_COLOR'] ?? '') === '' && process.env['TERM'] !== 'dumb';
  const columns = terminal ? stream.columns : 0;
  return { colour, width: columns >= 40 ? Math.min(columns, 120) : widthOfPages };
}

function isDevice(descriptor: number): boolean {
  try {
    return fstatSync(descriptor).isCharacterDevice();
  } catch {
    return false;
  }
}
