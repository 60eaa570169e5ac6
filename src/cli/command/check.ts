// skein check: all mistakes, every default, and what was understood.
import { dispersalReach, standingOf } from '../../analysis/standing.ts';
import { weatherFacts } from '../../analysis/weather.ts';
import { buildBlock } from '../../compile/block.ts';
import { growthRateOf } from '../../numeric/leading.ts';
import type { CompiledModel } from '../../pipeline.ts';
import { checkText, type Understood } from '../../report/check-text.ts';
import { Ending, exitCodes } from '../exit.ts';
import { readModel, tellDiagnostics, toldAlready, type Loaded } from '../load.ts';
import { settingsOf, type CommonOptions } from '../options.ts';
import { writeOut } from '../output.ts';
import { terminalAt } from '../terminal.ts';

export async function checkModel(path: string, options: CommonOptions & { readonly strict?: boolean }): Promise<void> {
  const loaded = await readModel(path, settingsOf(options), { ...options, everyScenario: true });
  const understood = loaded.compiled === null ? null : understand(loaded.compiled);
  if (options.json === true) writeOut(`${JSON.stringify(checkJson(loaded, understood), null, 2)}\n`);
  else {
    tellDiagnostics(loaded.diagnostics);
    if (understood !== null) writeOut(`${checkText(understood, terminalAt('stdout')).trimEnd()}\n`);
  }
  if (loaded.compiled === null) throw toldAlready();
  const warnings = loaded.diagnostics.filter((one) => one.severity === 'warning').length;
  if (options.strict === true && warnings > 0) {
    throw new Ending(
      exitCodes.model,
      `${warnings === 1 ? '1 warning' : `${warnings} warnings`}, and --strict lets warnings fail.`,
    );
  }
}

export function understand(compiled: CompiledModel): Understood {
  const { model, startAnimals } = compiled;
  return {
    model,
    landscape: compiled.landscape,
    startAnimals: startAnimals.reduce((sum, value) => sum + value, 0),
    standing: standingOf(compiled, startAnimals),
    reach: dispersalReach(compiled, startAnimals),
    growthRate: growthRateOf(buildBlock(compiled, 'zero').matrix),
    weather: model.variation === null ? null : weatherFacts(model.variation, compiled.landscape),
  };
}

function catastropheJson({ model, landscape }: Understood): unknown {
  return model.catastrophes.map(({ name }, k) => {
    const strike = landscape.strikes?.[k];
    const patches = model.patches.map((patch, p) => ({
      patch: patch.name,
      yearsStruck: strike?.on[p] ?? 0,
      yearsBegun: strike?.begins[p] ?? 0,
    }));
    return { name, patches };
  });
}

function checkJson({ diagnostics }: Loaded, understood: Understood | null): unknown {
  return {
    format: 'skein-check/1',
    diagnostics,
    defaults: understood?.model.defaults ?? null,
    growthRate: understood?.growthRate ?? null,
    patches: understood?.standing ?? null,
    dispersal: understood?.reach ?? null,
    variation: understood?.weather ?? null,
    catastrophes: understood === null ? null : catastropheJson(understood),
  };
}
