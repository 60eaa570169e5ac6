// The report of the fixture with the page script of the sources as they are now.
import { build } from 'esbuild';
import { buildReport } from '../../src/report/report.ts';
import { fixture, type FixtureChoice } from './fixture.ts';

export async function pageScript(): Promise<string> {
  const made = await build({
    entryPoints: [new URL('../../src/page/main.ts', import.meta.url).pathname],
    bundle: true,
    minify: true,
    format: 'iife',
    platform: 'browser',
    target: 'es2023',
    charset: 'utf8',
    write: false,
  });
  return made.outputFiles[0]!.text;
}

export async function reportPage(choice: FixtureChoice = {}): Promise<string> {
  return buildReport(fixture({ ...choice, pageScript: await pageScript() }));
}
