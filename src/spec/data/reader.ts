// Looks up the texts of named files, and tells of those that cannot be read.
import { put, type Report } from '../shape/report.ts';
import { sourceText, type SourceScalar } from '../text/source.ts';
import { mostDataCharacters, type DataFiles } from './files.ts';

export class FileReader {
  readonly #wants = new Set<string>();
  readonly #files: DataFiles;
  readonly #report: Report;

  constructor(files: DataFiles, report: Report) {
    this.#files = files;
    this.#report = report;
  }

  get wants(): readonly string[] {
    return [...this.#wants];
  }

  /** Where mistakes in the file are put; undefined after telling that it cannot be read. */
  open(name: SourceScalar): Report | undefined {
    this.#wants.add(name.source);
    const file = this.#files.get(name.source) ?? { ok: false, why: 'it was not handed over with the spec' };
    if (!file.ok) return this.#refuse(name, file.why, file.fix);
    if (file.text.length > mostDataCharacters) {
      return this.#refuse(name, 'it is too large', 'Simplify its outlines, or leave out what the model does not use.');
    }
    if (file.text.includes('\u0000')) return this.#refuse(name, 'it is not text', undefined);
    const text = file.text.startsWith('\uFEFF') ? file.text.slice(1) : file.text;
    return { source: sourceText(name.source, text), found: this.#report.found };
  }

  #refuse(name: SourceScalar, why: string, fix: string | undefined): undefined {
    const message = `The file cannot be read: ${why}`;
    put(this.#report, { code: 'data-missing', message, span: name.span }, { found: name.source, fix });
    return undefined;
  }
}
