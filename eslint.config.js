import tseslint from 'typescript-eslint';

// Functions whose last bits differ between engines: the kernel module has its own, which give the same bits everywhere.
const unstable = ['acos', 'acosh', 'asin', 'asinh', 'atan', 'atan2', 'atanh', 'cbrt', 'cos', 'cosh', 'exp', 'expm1'];
unstable.push('hypot', 'log', 'log10', 'log1p', 'log2', 'pow', 'sin', 'sinh', 'tan', 'tanh');

const sameBits = [
  ...unstable.map((property) => ({ object: 'Math', property, message: 'Use the kernel module (src/machine).' })),
  { object: 'Math', property: 'random', message: 'Chance comes from the seed.' },
  { object: 'Date', property: 'now', message: 'The clock belongs to cli/ and server/.' },
];

export default tseslint.config(
  { ignores: ['build/', 'node_modules/', 'coverage/', 'assembly/'] },
  ...tseslint.configs.strict,
  {
    rules: {
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/switch-exhaustiveness-check': 'off',
      'max-params': ['error', 4],
      eqeqeq: 'error',
      '@typescript-eslint/no-unused-vars': ['error', { ignoreRestSiblings: true }],
    },
  },
  {
    files: ['src/**/*.ts'],
    ignores: ['src/view/**', 'src/page/**', 'src/cli/**'],
    rules: {
      'no-restricted-properties': ['error', ...sameBits],
      'no-restricted-syntax': [
        'error',
        { selector: 'BinaryExpression[operator="**"]', message: 'Powers come from the kernel module (src/machine).' },
      ],
    },
  },
  { files: ['test/**/*.ts'], rules: { '@typescript-eslint/no-non-null-assertion': 'off' } },
  { files: ['bin/**/*.mjs'], languageOptions: { globals: { process: 'readonly', console: 'readonly' } } },
  {
    // Node starts a script sooner than a module.
    files: ['bin/**/*.cjs'],
    languageOptions: {
      sourceType: 'commonjs',
      globals: Object.fromEntries(
        ['process', 'console', 'require', 'module', '__dirname'].map((name) => [name, 'readonly']),
      ),
    },
    rules: { '@typescript-eslint/no-require-imports': 'off' },
  },
);
