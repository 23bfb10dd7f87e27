import js from '@eslint/js';
import prettier from 'eslint-config-prettier';
import svelte from 'eslint-plugin-svelte';
import globals from 'globals';
import { fileURLToPath } from 'node:url';
import { includeIgnoreFile } from 'eslint/config';
import ts from 'typescript-eslint';
import svelteConfig from './svelte.config.js';

const sciences = ['remarks', 'phylogeny', 'overlap', 'statistics', 'analysis'].map((room) => `src/lib/${room}/**/*.ts`);
const notPure = (name, instead) => ({ name, message: `The sciences are pure: ${instead}` });

export default ts.config(
	includeIgnoreFile(fileURLToPath(new URL('./.gitignore', import.meta.url))),
	js.configs.recommended,
	...ts.configs.recommended,
	...svelte.configs.recommended,
	prettier,
	...svelte.configs.prettier,
	{
		languageOptions: { globals: { ...globals.browser, ...globals.node } },
		rules: {
			'no-undef': 'off',
			'max-lines-per-function': ['error', { max: 60, skipBlankLines: true, skipComments: true }],
			'max-lines': ['error', { max: 300, skipBlankLines: true, skipComments: true }],
			'max-depth': ['error', 4],
			'max-params': ['error', 4],
			eqeqeq: ['error', 'always', { null: 'ignore' }],
			'@typescript-eslint/no-explicit-any': 'error',
			'@typescript-eslint/no-non-null-assertion': 'error',
			'@typescript-eslint/consistent-type-imports': ['error', { prefer: 'type-imports', disallowTypeAnnotations: false }],
			'@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
			'svelte/no-navigation-without-resolve': 'off',
			'svelte/no-at-html-tags': 'error'
		}
	},
	{
		files: ['**/*.svelte', '**/*.svelte.ts', '**/*.svelte.js'],
		languageOptions: {
			parserOptions: { projectService: true, extraFileExtensions: ['.svelte'], parser: ts.parser, svelteConfig }
		},
		rules: { 'max-lines-per-function': 'off' }
	},
	{
		files: ['**/*.test.ts', 'tests/**/*.ts'],
		rules: { 'max-lines-per-function': 'off' }
	},
	{
		// A compiled function takes addresses and counts as plain numbers; it knows no other options.
		files: ['src/kernel/*.ts'],
		rules: { 'max-params': ['error', 8] }
	},
	{
		files: sciences,
		ignores: ['**/*.test.ts'],
		rules: {
			'no-restricted-globals': [
				'error',
				notPure('process', 'pass the value in.'),
				notPure('console', 'return a remark.'),
				notPure('fetch', 'pass the data in.'),
				notPure('performance', 'time belongs to tests/bench.'),
				notPure('Date', 'pass the time in as text.'),
				notPure('window', 'they know no browser.'),
				notPure('document', 'they know no browser.')
			],
			'no-restricted-properties': [
				'error',
				{ object: 'Math', property: 'random', message: 'The sciences are pure: take a RandomStream built from the stored seed.' }
			]
		}
	},
	{
		files: ['src/**/*.ts', 'src/**/*.svelte'],
		ignores: ['src/lib/server/env.ts', 'src/commands/**', '**/*.test.ts'],
		rules: {
			'no-restricted-syntax': [
				'error',
				{
					selector: "MemberExpression[object.name='process'][property.name='env']",
					message: 'Only src/lib/server/env.ts reads the environment; take the value from there.'
				}
			]
		}
	}
);
