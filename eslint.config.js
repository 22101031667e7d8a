import angular from 'angular-eslint';
import tseslint from 'typescript-eslint';

const clientFeatures = 'home|bench|reports|filing|review|watches|clubs|account|spread|handbook';
const serverFeatures = 'accounts|clubs|catalogue|photos|drafts|reports|review|watches|digests'
  + '|notices|registry';

/** The owner of the pool is server/db alone: another one inside a transaction would deadlock. */
const pool = {
  regex: '^(pg|pg-pool|knex|pg-boss|connect-pg-simple)$',
  allowTypeImports: true,
  message: 'Only server/db (and jobs, sessions: by their own adapters) opens connections.',
};
const decoder = { regex: '^sharp$', message: 'Only server/images decodes pictures.' };
const tests = { regex: '^(#tests/|(\\.\\./)+tests/)', message: 'Nothing imports tests.' };
const client = {
  regex: '^(\\.\\./)+client/|^@angular/',
  message: 'Client and server never meet; what both need belongs into shared.',
};
const server = {
  regex: '^(#server/|#database/|(\\.\\./)+(server|database)/|node:|express|zod|knex|pg|sharp)',
  message: 'Client and server never meet; what both need belongs into shared.',
};
const restrict = (...patterns) => ({
  '@typescript-eslint/no-restricted-imports': ['error', { patterns }],
});

/** `!` is allowed only with its reason in a comment on the same line or the one above. */
const reasonBesideNonNull = {
  meta: { type: 'problem', schema: [], messages: { bare: 'Say in a comment why `!` holds.' } },
  create(context) {
    const commented = new Set(
      context.sourceCode.getAllComments().flatMap(({ loc }) => [loc.end.line, loc.end.line + 1]),
    );
    return {
      TSNonNullExpression(node) {
        if (!commented.has(node.loc.end.line)) context.report({ node, messageId: 'bare' });
      },
    };
  },
};

export default tseslint.config(
  {
    ignores: [
      'node_modules/', 'dist/', '.angular/', '.cache/', '.data/', 'coverage/', 'screenshots/',
      'test-results/', 'playwright-report/',
    ],
  },
  { linterOptions: { noInlineConfig: true, reportUnusedInlineConfigs: 'error' } },
  {
    files: ['**/*.{ts,js,mjs}'],
    extends: [...tseslint.configs.strict],
    plugins: { touchneedle: { rules: { 'reason-beside-non-null': reasonBesideNonNull } } },
    rules: {
      eqeqeq: 'error',
      'max-len': ['error', { code: 100, ignoreUrls: true }],
      'max-lines': ['error', { max: 400 }],
      'no-console': 'off',
      'prefer-const': 'error',
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/no-non-null-assertion': 'off',
      'touchneedle/reason-beside-non-null': 'error',
      // Components and services are classes without members at times.
      '@typescript-eslint/no-extraneous-class': ['error', { allowWithDecorator: true }],
      '@typescript-eslint/no-unused-vars': [
        'error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_', ignoreRestSiblings: true },
      ],
      'no-restricted-syntax': [
        'error',
        { selector: 'ExportDefaultDeclaration', message: 'Named exports only.' },
        {
          selector: 'TSAsExpression > TSAsExpression > TSUnknownKeyword',
          message: 'A cast through unknown hides a wrong type.',
        },
      ],
    },
  },
  // Tools that read a default export and nothing else.
  {
    files: ['*.config.{js,ts,mjs}', '**/*.config.{js,ts,mjs}', 'database/knexfile.ts',
      'client/src/test-providers.ts', 'tests/**/global-setup.ts'],
    rules: { 'no-restricted-syntax': 'off' },
  },
  // A rejected promise that nobody waits for takes the process with it, or is lost.
  {
    files: ['server/**/*.ts', 'shared/**/*.ts', 'database/**/*.ts', 'tests/**/*.ts'],
    languageOptions: { parserOptions: { projectService: true } },
    rules: {
      '@typescript-eslint/await-thenable': 'error',
      '@typescript-eslint/no-floating-promises': 'error',
    },
  },
  {
    files: ['shared/**/*.ts'],
    rules: restrict(tests, client, server),
  },
  {
    files: ['server/**/*.ts'],
    rules: restrict(tests, client, pool, decoder, {
      // Links and tokens are pure derivations without a store; a mail needs those of others.
      regex: `^\\.\\./(${serverFeatures})/(?!.*-(queries|schemas|token|link)$)`,
      allowTypeImports: true,
      message: 'Another feature is reached by its queries, or by its service from compose.ts.',
    }),
  },
  {
    files: ['server/{http,jobs,mail,images,db,audit}/**/*.ts'],
    rules: restrict(tests, client, pool, decoder, {
      regex: `^\\.\\./(${serverFeatures})/`,
      message: 'What all features stand on imports none of them.',
    }),
  },
  { files: ['server/images/**/*.ts'], rules: restrict(tests, client, pool) },
  { files: ['server/{db,jobs}/**/*.ts'], rules: restrict(tests, client, decoder) },
  {
    files: ['server/{app,compose,main,worker}.ts', 'server/**/*.spec.ts'],
    rules: restrict(client, decoder),
  },
  {
    files: ['client/src/**/*.ts'],
    extends: [...angular.configs.tsRecommended],
    processor: angular.processInlineTemplates,
    rules: {
      ...restrict(tests, server, {
        regex: `^(\\.\\./)+(${clientFeatures})/(?!.*-api$)`,
        message: 'Across features only a feature\'s api may be imported.',
      }),
      'no-restricted-globals': [
        'error',
        ...['window', 'document', 'localStorage', 'sessionStorage', 'navigator', 'location',
          'history', 'alert', 'confirm', 'fetch'].map((name) => ({
          name,
          message: 'Inject DOCUMENT, a token or a service, or wait for afterNextRender.',
        })),
      ],
      '@angular-eslint/component-class-suffix': 'off',
      '@angular-eslint/directive-class-suffix': 'off',
      '@angular-eslint/component-selector': [
        'error', { type: 'element', prefix: 'tn', style: 'kebab-case' },
      ],
      '@angular-eslint/directive-selector': [
        'error', { type: 'attribute', prefix: 'tn', style: 'camelCase' },
      ],
      '@angular-eslint/prefer-on-push-component-change-detection': 'error',
      '@angular-eslint/prefer-inject': 'error',
      '@angular-eslint/prefer-standalone': 'error',
    },
  },
  {
    files: ['client/src/app/{ui,http,auth}/**/*.ts'],
    rules: restrict(tests, server, {
      regex: `^(\\.\\./)+(${clientFeatures}|shell)/`,
      message: 'What all features stand on imports none of them.',
    }),
  },
  // The drawings are one string each.
  {
    files: ['client/src/app/ui/icon-paths.ts'],
    rules: { 'max-len': ['error', { code: 100, ignoreStrings: true }] },
  },
  {
    files: ['client/src/**/*.spec.ts'],
    rules: {
      '@angular-eslint/prefer-on-push-component-change-detection': 'off',
      '@angular-eslint/component-selector': 'off',
    },
  },
  {
    files: ['client/src/app/**/*.html', 'client/src/app/**/*.ts/*.html'],
    extends: [...angular.configs.templateRecommended, ...angular.configs.templateAccessibility],
    rules: {
      '@angular-eslint/template/i18n': [
        'error',
        {
          checkId: false,
          checkText: true,
          checkAttributes: true,
          checkDuplicateId: false,
          boundTextAllowedPattern: '[\\s\\d·:,.()/±×–-]*',
          // Attributes that hold codes, names and settings, never words for the reader.
          ignoreAttributes: [
            'accept', 'actions', 'appearance', 'aria-controls', 'aria-current', 'aria-describedby',
            'aria-labelledby', 'aria-live', 'aria-modal', 'aria-orientation',
            'ariaCurrentWhenActive', 'autocapitalize', 'autocomplete', 'capture', 'd', 'decoding',
            'dx', 'dy', 'enterkeyhint', 'fill', 'form', 'formArrayName', 'formGroupName',
            'fragment', 'iconPositionEnd', 'inputmode', 'kind', 'labelPosition', 'list', 'loading',
            'matButton', 'matColumnDef',
            'mode', 'name', 'orientation', 'pattern', 'points', 'preserveAspectRatio',
            'queryParamsHandling', 'routerLinkActive', 'scope', 'shape', 'side', 'size', 'slot',
            'spellcheck', 'state', 'step', 'text-anchor', 'transform', 'value', 'when',
          ],
        },
      ],
      '@angular-eslint/template/no-inline-styles': [
        'error', { allowBindToStyle: true, allowNgStyle: false },
      ],
      '@angular-eslint/template/prefer-control-flow': 'error',
      '@angular-eslint/template/button-has-type': 'error',
      '@angular-eslint/template/no-any': 'error',
    },
  },
);
