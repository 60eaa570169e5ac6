// Memory by hand: one image and what a run of it needs, one after the other from the end of the module's own data.

let next: usize = 0;

/** Forgets everything reserved. */
export function release(): void {
  next = 0;
}

/** Address of so many fresh bytes, aligned to 16; 0 where the memory cannot grow so far. */
export function reserve(bytes: usize): usize {
  const start = ((next === 0 ? __heap_base : next) + 15) & ~(<usize>15);
  const end = start + bytes;
  const pages = <i32>((end + 0xffff) >> 16) - memory.size();
  if (pages > 0 && memory.grow(pages) < 0) return 0;
  next = end;
  return start;
}
