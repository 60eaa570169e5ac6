// Kernel and model in one module: the same counts as a run, in Node and in a browser, with the lines that the README prints.
import { execFileSync } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { openRunner } from '../../src/kernel/run.ts';
import { modelModule, sectionName } from '../../src/export/model-module.ts';
import { folder, skein } from '../cli/skein.ts';
import { compileModel, modelNames } from '../golden/models.ts';
import { launch } from '../page/browser.ts';
import { codeBlock } from './readme.ts';

interface Description {
  readonly format: string;
  readonly hash: string;
  readonly seed: number;
  readonly years: number;
  readonly image: { readonly address: number; readonly size: number };
  readonly columns: readonly string[];
}

let browser: Browser;
beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

describe.each(modelNames)('the module of %s', (name) => {
  const compiled = compileModel(name);
  const { seed, steps } = compiled.model;
  const module = modelModule(compiled);
  const expected = openRunner(compiled.image, { seed, steps })({ first: 0, lanes: 16 }).counts;

  test('is valid, imports nothing and says what it is', () => {
    const made = new WebAssembly.Module(module);
    expect(WebAssembly.Module.imports(made)).toEqual([]);
    const [section] = WebAssembly.Module.customSections(made, sectionName);
    const said = JSON.parse(new TextDecoder().decode(section)) as Description;
    expect(said).toMatchObject({ format: 'skein-module/1', hash: compiled.provenance.hash, seed, years: steps });
    expect(said.columns).toHaveLength(expected.length / 16 / (steps + 1));
    const memory = new WebAssembly.Instance(made).exports['memory'] as WebAssembly.Memory;
    const inside = new Uint8Array(memory.buffer, said.image.address, said.image.size);
    expect(Buffer.from(inside).equals(Buffer.from(compiled.image))).toBe(true);
  });

  test('counts in a browser what a run counts here, year by year', async () => {
    const page = await browser.newPage();
    const counts = await page.evaluate(countYears, { bytes: Buffer.from(module).toString('base64'), steps, seed });
    await page.close();
    expect(counts).toEqual(Array.from(expected));
  });
});

/** Runs in the page. */
function countYears({ bytes, steps, seed }: { bytes: string; steps: number; seed: number }): number[] {
  const module = new WebAssembly.Module(Uint8Array.from(atob(bytes), (letter) => letter.charCodeAt(0)));
  const model = JSON.parse(new TextDecoder().decode(WebAssembly.Module.customSections(module, 'skein-model')[0]));
  // eslint-disable-next-line @typescript-eslint/no-explicit-any -- The exports of a module have no types of their own.
  const kernel: any = new WebAssembly.Instance(module).exports;
  if (kernel.open(kernel.reserve(model.image.size), model.image.size) !== 0) throw new Error('cannot be opened');
  new Uint32Array(kernel.memory.buffer, kernel.replicates(), 16).set(Array.from({ length: 16 }, (_, lane) => lane));
  kernel.start(16, seed % 2 ** 32, Math.floor(seed / 2 ** 32));
  const counts: number[] = [];
  for (let step = 0; step <= steps; step++) {
    if (step > 0) kernel.step();
    counts.push(...new Float64Array(kernel.memory.buffer, kernel.observed(), model.columns.length * 16));
  }
  return counts;
}

describe('the lines of the README', () => {
  let [site, server, lines]: [string, Server | null, string] = ['', null, ''];

  beforeAll(() => {
    const compiled = compileModel('reed-hare');
    const { seed, steps, patches, outcomes } = compiled.model;
    const { counts } = openRunner(compiled.image, { seed, steps })({ first: 0, lanes: 16 });
    const names = ['all', ...patches.map((one) => one.name), ...outcomes.map((one) => one.name)];
    const last = steps * names.length * 16;
    lines = names.map((name, k) => `${name} ${counts.slice(last + k * 16, last + k * 16 + 16).join(' ')}`).join('\n');
  });
  afterAll(() => {
    server?.close();
  });

  function compiledFolder(): string {
    const cwd = folder();
    expect(skein(['compile', 'models/reed-hare.yaml', '-o', 'model.wasm', '--quiet'], { cwd }).code).toBe(0);
    return cwd;
  }

  test('run the module in plain Node', () => {
    const cwd = compiledFolder();
    writeFileSync(join(cwd, 'run.mjs'), codeBlock('js', 'WebAssembly'));
    expect(execFileSync(process.execPath, ['run.mjs'], { cwd, encoding: 'utf8' }).trimEnd()).toBe(lines);
  });

  test('run the module in a page', async () => {
    const module = readFileSync(join(compiledFolder(), 'model.wasm'));
    const html = `<!doctype html><title>model</title>${codeBlock('html', 'WebAssembly')}`;
    server = createServer(({ url }, response) => {
      const wasm = url === '/model.wasm';
      response.setHeader('content-type', wasm ? 'application/wasm' : 'text/html').end(wasm ? module : html);
    });
    await new Promise<void>((resolve) => server?.listen(0, '127.0.0.1', resolve));
    site = `http://127.0.0.1:${String((server.address() as AddressInfo).port)}/`;
    const page = await browser.newPage();
    await page.goto(site);
    await page.waitForFunction('document.querySelector("#out").textContent !== ""');
    expect(await page.textContent('#out')).toBe(lines);
    await page.close();
  });
});
