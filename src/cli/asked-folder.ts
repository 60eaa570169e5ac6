// The folder of `--out`. What writes tables is loaded only where it is asked for.
import type { OutFolder } from './out-folder.ts';

/** Made, and tried for writing, before the work begins; null where none is asked for. */
export async function askedFolder({ out }: { readonly out?: string }): Promise<OutFolder | null> {
  return out === undefined ? null : (await import('./out-folder.ts')).openOutFolder(out);
}
