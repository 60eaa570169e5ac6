// JSON (RFC 8259) as a tree in which every value has its place. Data files are too long for the reader of specs.
import type { Plain, SourceEntry, SourceNode, SourceText } from '../text/source.ts';

export interface JsonMistake {
  readonly offset: number;
  readonly message: string;
}

export type ReadJson =
  { readonly ok: true; readonly root: SourceNode } | { readonly ok: false; readonly mistake: JsonMistake };

const deepest = 40;

export function readJson(source: SourceText): ReadJson {
  const reader = new JsonReader(source.text);
  try {
    return { ok: true, root: reader.whole() };
  } catch (error) {
    if (error instanceof Stop) return { ok: false, mistake: { offset: reader.at, message: error.message } };
    throw error;
  }
}

class Stop extends Error {}

const words: Readonly<Record<string, Plain>> = { true: true, false: false, null: null };

class JsonReader {
  readonly #text: string;
  readonly #number = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/uy;
  readonly #blank = /[ \t\r\n]*/uy;
  readonly #plain = /[^"\\\u0000-\u001f]*/uy;
  at = 0;

  constructor(text: string) {
    this.#text = text;
  }

  whole(): SourceNode {
    const root = this.#value(0);
    this.#skip();
    if (this.at < this.#text.length) throw new Stop('Something follows after the end of the JSON value');
    return root;
  }

  #value(depth: number): SourceNode {
    if (depth > deepest) throw new Stop('Lists and objects are nested too deeply');
    this.#skip();
    const start = this.at;
    const mark = this.#text.charAt(start);
    if (mark === '{') return this.#object(depth);
    if (mark === '[') return this.#list(depth);
    if (mark === '"') {
      const value = this.#string();
      return { kind: 'scalar', value, source: value, plain: false, span: { offset: start, length: this.at - start } };
    }
    return this.#word(start);
  }

  #word(start: number): SourceNode {
    this.#number.lastIndex = start;
    const number = this.#number.exec(this.#text)?.[0];
    const source = number ?? Object.keys(words).find((word) => this.#text.startsWith(word, start));
    if (source === undefined) throw new Stop(this.#text === '' ? 'The file holds nothing' : 'A JSON value is missing');
    this.at += source.length;
    const value = number === undefined ? (words[source] ?? null) : Number(number);
    return { kind: 'scalar', value, source, plain: true, span: { offset: start, length: source.length } };
  }

  #list(depth: number): SourceNode {
    const start = this.at++;
    const items: SourceNode[] = [];
    if (!this.#ends(']')) {
      do items.push(this.#value(depth + 1));
      while (this.#goesOn(']'));
    }
    return { kind: 'list', items, span: { offset: start, length: this.at - start } };
  }

  #object(depth: number): SourceNode {
    const start = this.at++;
    const entries = new Map<string, SourceEntry>();
    if (!this.#ends('}')) {
      do {
        const entry = this.#entry(depth);
        if (entries.has(entry.key)) throw new Stop(`The key "${entry.key}" stands twice in this object`);
        entries.set(entry.key, entry);
      } while (this.#goesOn('}'));
    }
    return { kind: 'map', entries: [...entries.values()], span: { offset: start, length: this.at - start } };
  }

  #entry(depth: number): SourceEntry {
    this.#skip();
    const start = this.at;
    if (this.#text.charAt(start) !== '"') throw new Stop('A key in double quotes is missing');
    const key = this.#string();
    const keySpan = { offset: start, length: this.at - start };
    this.#skip();
    if (this.#text.charAt(this.at) !== ':') throw new Stop('A colon is missing after the key');
    this.at++;
    return { key, keySpan, plain: false, value: this.#value(depth + 1) };
  }

  #string(): string {
    const start = this.at++;
    for (;;) {
      this.#plain.lastIndex = this.at;
      this.at += this.#plain.exec(this.#text)?.[0].length ?? 0;
      const mark = this.#text.charAt(this.at);
      if (mark === '"') break;
      if (mark !== '\\') throw new Stop('A text in double quotes does not end on its line');
      this.at += 2;
    }
    this.at++;
    return this.#unescaped(start);
  }

  /** The library reads the escapes; the text between the quotes was bounded above. */
  #unescaped(start: number): string {
    const written = this.#text.slice(start, this.at);
    if (!written.includes('\\')) return written.slice(1, -1);
    try {
      return String(JSON.parse(written));
    } catch {
      this.at = start;
      throw new Stop('A backslash begins something unknown');
    }
  }

  #ends(close: string): boolean {
    this.#skip();
    if (this.#text.charAt(this.at) !== close) return false;
    this.at++;
    return true;
  }

  #goesOn(close: string): boolean {
    this.#skip();
    const mark = this.#text.charAt(this.at);
    if (mark !== ',' && mark !== close) throw new Stop(`A comma or ${close} is missing`);
    this.at++;
    return mark === ',';
  }

  #skip(): void {
    this.#blank.lastIndex = this.at;
    this.at += this.#blank.exec(this.#text)?.[0].length ?? 0;
  }
}
