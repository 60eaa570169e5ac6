// Wrong texts that are too long or too strange to keep as files.

export const madeTexts: Readonly<Record<string, string>> = {
  'file-empty': '\n\n',
  'file-not-text': 'skein: 1\nstudy: { title: Two\u0000fens }\n',
  'file-too-large': `skein: 1\npatches: [${'1, '.repeat(60_000)}]\n`,
  'many-mistakes': `skein: 1\n${Array.from({ length: 110 }, (_, i) => `fen${String(i)}: 1\n`).join('')}`,
  'yaml-nesting': `skein: 1\npatches: ${'['.repeat(10_000)}${']'.repeat(10_000)}\n`,
};
