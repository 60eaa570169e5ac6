// Text that becomes part of a page is escaped wherever it is put.
import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { escape, mark, Markup } from '../../src/view/markup.ts';
import { inScript } from '../../src/report/document.ts';

describe('mark', () => {
  it('escapes strings between tags and in quoted attributes', () => {
    expect(mark`<p title="${'"><b>'}">${"a<b & 'c'"}</p>`.text).toBe(
      '<p title="&quot;&gt;&lt;b&gt;">a&lt;b &amp; &#39;c&#39;</p>',
    );
  });

  it('takes in its own markup as it is, and lists of it', () => {
    expect(mark`<ul>${['<', '>'].map((one) => mark`<li>${one}</li>`)}</ul>`.text).toBe(
      '<ul><li>&lt;</li><li>&gt;</li></ul>',
    );
  });

  it('takes nothing that only looks like markup, such as data with the same fields', () => {
    const data: unknown = JSON.parse('{"text":"<b>"}');
    expect(data instanceof Markup).toBe(false);
  });

  it('writes coordinates with two decimals at most', () => {
    expect(mark`${1 / 3} ${2} ${-0.004}`.text).toBe('0.33 2 0');
  });
});

describe('escape', () => {
  it('leaves no character that a parser could take for structure, and none that XML forbids', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const safe = escape(text);
        expect(safe).not.toMatch(
          /[<>"'`\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f-\u009f]|&(?!(?:amp|lt|gt|quot|#39|#96);)/,
        );
      }),
      { seed: 20, numRuns: 500 },
    );
  });

  it('replaces halves of surrogate pairs and keeps whole ones', () => {
    expect(escape('\ud83d')).toBe('\uFFFD');
    expect(escape('😀')).toBe('😀');
  });
});

describe('data in a script element', () => {
  it('comes back as it was and cannot end the element', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const written = inScript({ text: `</script><!--${text}` });
        expect(written).not.toMatch(/[<>&]/);
        expect(JSON.parse(written)).toEqual({ text: `</script><!--${text}` });
      }),
      { seed: 21, numRuns: 300 },
    );
  });
});
