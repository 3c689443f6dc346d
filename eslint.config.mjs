import coreWebVitals from 'eslint-config-next/core-web-vitals';
import nextTypescript from 'eslint-config-next/typescript';

/**
 * The arrows of the architecture: each folder and what it must not import. What is not named is allowed.
 * tests/architecture/layers.test.ts breaks each of them and expects the error.
 */
const forbiddenImports = {
  'lib/hydraulics': everythingBut('lib/hydraulics'),
  'lib/units': everythingBut('lib/units'),
  'lib/balancing': everythingBut('lib/balancing', 'lib/hydraulics'),
  'lib/commissioning': everythingBut('lib/commissioning', 'lib/hydraulics'),
  'lib/network': everythingBut('lib/network', 'lib/hydraulics', 'lib/units'),
  'lib/catalogue': everythingBut('lib/catalogue', 'lib/hydraulics', 'lib/network', 'lib/units'),
  'lib/api': ['app', 'components', 'db', 'lib/server', 'lib/client', 'lib/setup'],
  'lib/client': ['app', 'components', 'db', 'lib/server', 'lib/setup'],
  'lib/server': ['app', 'components', 'lib/client', 'lib/setup'],
  'lib/setup': ['app', 'components', 'lib/server', 'lib/client', 'lib/api'],
  components: ['app', 'db', 'lib/server', 'lib/setup'],
  db: ['app', 'components', 'lib/client', 'lib/setup'],
  app: ['lib/setup', 'tests', 'e2e'],
};

/** @param {string[]} allowed */
function everythingBut(...allowed) {
  const folders = ['api', 'balancing', 'catalogue', 'client', 'commissioning', 'hydraulics', 'network', 'server', 'setup', 'units'];
  return ['app', 'components', 'db', ...folders.map((folder) => `lib/${folder}`)].filter((folder) => !allowed.includes(folder));
}

const config = [
  // Made, not written.
  {
    ignores: [
      '.next/**',
      '.next-test/**',
      '.data/**',
      '.stryker-tmp/**',
      'reports/**',
      'coverage/**',
      'test-results/**',
      'playwright-report/**',
      'public/**',
      'next-env.d.ts',
    ],
  },
  // Broken on purpose, for the test of the rule against cycles.
  { ignores: ['tests/architecture/cycle/**'] },
  ...coreWebVitals,
  ...nextTypescript,
  {
    files: ['**/*.{ts,tsx,mjs}'],
    settings: { 'import/ignore': ['node_modules'], 'import/resolver': { typescript: { alwaysTryTypes: true, project: 'tsconfig.json' } } },
    rules: {
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      'import/no-cycle': ['error', { ignoreExternal: true }],
      'import/no-restricted-paths': [
        'error',
        { zones: Object.entries(forbiddenImports).flatMap(([target, from]) => from.map((folder) => zone(target, folder))) },
      ],
    },
  },
  // A tool's configuration is its file; it needs no name.
  { files: ['*.config.{ts,mjs}'], rules: { 'import/no-anonymous-default-export': 'off' } },
  {
    files: ['**/*.{ts,tsx}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      // The rows of long tables come from a library whose functions the React compiler does not memoise; it says so by leaving them alone.
      'react-hooks/incompatible-library': 'off',
    },
  },
];

/**
 * @param {string} target
 * @param {string} from
 */
function zone(target, from) {
  return {
    target: `./${target}`,
    from: `./${from}`,
    message: `${target} must not import from ${from} (the arrows are in eslint.config.mjs)`,
  };
}

export default config;
