// Colours: on a terminal, unless NO_COLOR (https://no-color.org) or a dumb terminal says otherwise.
import { afterEach, describe, expect, test, vi } from 'vitest';
import { terminalOf } from '../../src/cli/terminal.ts';

const screen = { isTTY: true, columns: 90 } as NodeJS.WriteStream;
const pipe = {} as NodeJS.WriteStream;

afterEach(() => {
  vi.unstubAllEnvs();
});

function underEnvironment(noColour: string | undefined, term: string): void {
  vi.stubEnv('NO_COLOR', noColour);
  vi.stubEnv('TERM', term);
}

describe('colours', () => {
  test('on a terminal', () => {
    underEnvironment(undefined, 'xterm-256color');
    expect(terminalOf(screen)).toEqual({ colour: true, width: 90 });
  });

  test('not with NO_COLOR, whatever it holds but nothing', () => {
    underEnvironment('1', 'xterm');
    expect(terminalOf(screen).colour).toBe(false);
    underEnvironment('0', 'xterm');
    expect(terminalOf(screen).colour).toBe(false);
    underEnvironment('', 'xterm');
    expect(terminalOf(screen).colour).toBe(true);
  });

  test('not on a dumb terminal and not in a pipe', () => {
    underEnvironment(undefined, 'dumb');
    expect(terminalOf(screen).colour).toBe(false);
    underEnvironment(undefined, 'xterm');
    expect(terminalOf(pipe)).toEqual({ colour: false, width: 100 });
  });
});

describe('width', () => {
  test('that of the terminal within reason; a terminal of no width has 100 columns', () => {
    const widthAt = (columns: number): number => terminalOf({ isTTY: true, columns } as NodeJS.WriteStream).width;
    expect([0, 20, 40, 80, 400].map(widthAt)).toEqual([100, 100, 40, 80, 120]);
  });
});
