// One WebAssembly module from the kernel and an image: the image becomes part of the module's own memory, where the first
// `reserve` gives it away, and a custom section says what the model is. No compiler is needed for that.
import { readUnsigned, signed, unsigned } from './leb.ts';

/** Numbers of sections in the binary format (WebAssembly core specification). */
const customSection = 0;
const memorySection = 5;
const dataSection = 11;
const dataCountSection = 12;
const headerBytes = 8;
const pageBytes = 65536;

interface Section {
  readonly id: number;
  readonly body: Uint8Array;
}

export interface ModelModule {
  readonly kernel: Uint8Array;
  readonly image: Uint8Array;
  /** Where the image stands in the memory of the module. */
  readonly address: number;
  readonly section: { readonly name: string; readonly text: string };
}

export function writeModule({ kernel, image, address, section }: ModelModule): Uint8Array<ArrayBuffer> {
  const pages = Math.ceil((address + image.length) / pageBytes);
  const sections = sectionsOf(kernel).map((one) => {
    if (one.id === memorySection) return withPages(one, pages);
    if (one.id === dataCountSection) return { id: one.id, body: bytes(unsigned(readUnsigned(one.body, 0).value + 1)) };
    return one.id === dataSection ? withSegment(one, address, image) : one;
  });
  if (!sections.some(({ id }) => id === dataSection)) {
    sections.push(withSegment({ id: dataSection, body: bytes([0]) }, address, image));
  }
  const name = new TextEncoder().encode(section.name);
  const described = bytes(unsigned(name.length), name, new TextEncoder().encode(section.text));
  sections.push({ id: customSection, body: described });
  return bytes(
    kernel.subarray(0, headerBytes),
    ...sections.map(({ id, body }) => bytes([id], unsigned(body.length), body)),
  );
}

function sectionsOf(module: Uint8Array): Section[] {
  const sections: Section[] = [];
  for (let at = headerBytes; at < module.length;) {
    const { value: size, next } = readUnsigned(module, at + 1);
    sections.push({ id: module[at] ?? 0, body: module.subarray(next, next + size) });
    at = next + size;
  }
  return sections;
}

/** One memory, of at least so many pages. A flag before the number says whether a maximum follows. */
function withPages({ id, body }: Section, pages: number): Section {
  const flag = body[1] ?? 0;
  const { value, next } = readUnsigned(body, 2);
  return { id, body: bytes([1, flag], unsigned(Math.max(value, pages)), body.subarray(next)) };
}

/** An active segment: kind 0, `i32.const address`, `end`, then its bytes. */
function withSegment({ id, body }: Section, address: number, image: Uint8Array): Section {
  const { value: count, next } = readUnsigned(body, 0);
  const segment = bytes([0, 0x41], signed(address), [0x0b], unsigned(image.length), image);
  return { id, body: bytes(unsigned(count + 1), body.subarray(next), segment) };
}

function bytes(...parts: readonly (Uint8Array | readonly number[])[]): Uint8Array<ArrayBuffer> {
  const joined = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    joined.set(part, at);
    at += part.length;
  }
  return joined;
}
