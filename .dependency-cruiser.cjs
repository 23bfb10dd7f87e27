/** The import table of DEVELOPERS.md as rules. Every comment says where the code should go instead. */
const sciences = '^src/lib/(phylogeny|overlap|statistics)/';
const tests = '[.](test|bench)[.]ts$';

const room = (name, from, allowed, comment) => ({
	name,
	comment,
	severity: 'error',
	from: { path: from, pathNot: tests },
	to: { path: '^src/', pathNot: allowed }
});

module.exports = {
	forbidden: [
		{
			name: 'no-cycles',
			comment: 'Two files that need each other are one file, or share a third that both import.',
			severity: 'error',
			from: {},
			// A circle closed by a type alone is gone once compiled.
			to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } }
		},
		room(
			'remarks-alone',
			'^src/lib/remarks/',
			'^src/lib/remarks/',
			'The base room knows nobody. Put the code in the room that needs it.'
		),
		room(
			'phylogeny-alone',
			'^src/lib/phylogeny/',
			'^src/lib/(phylogeny|remarks)/',
			'phylogeny knows only trees. What joins trees with overlaps belongs in analysis.'
		),
		room(
			'overlap-alone',
			'^src/lib/overlap/',
			'^src/lib/(overlap|remarks)/',
			'overlap knows only overlaps. What joins them with trees belongs in analysis.'
		),
		room(
			'kernel-alone',
			'^src/kernel/',
			'^src/kernel/',
			'The kernel is another language: it is compiled, not imported. Call it through statistics/kernelRegions.ts.'
		),
		room(
			'statistics-of-sciences',
			'^src/lib/statistics/',
			'^src/lib/(statistics|phylogeny|overlap|remarks)/',
			'statistics may use trees and overlaps, nothing above them. What reads a plan belongs in analysis.'
		),
		room(
			'analysis-composes',
			'^src/lib/analysis/',
			'^src/lib/(analysis|statistics|phylogeny|overlap|remarks|contracts)/',
			'analysis composes the sciences and knows contracts. What stores or sends belongs in server.'
		),
		room(
			'contracts-are-shapes',
			'^src/lib/contracts/',
			'^src/lib/(contracts|phylogeny|overlap|statistics|remarks)/',
			'contracts are schemas and types. Behaviour belongs in the room that has it.'
		),
		room(
			'figures-draw',
			'^src/lib/figures/',
			'^src/lib/(figures|contracts|phylogeny|overlap|statistics|remarks)/',
			'figures are given numbers and draw them. Computing belongs in the sciences, fetching in routes.'
		),
		room(
			'components-know-no-science',
			'^src/lib/components/',
			'^src/lib/components/',
			'A part that knows science or data belongs beside its page.'
		),
		room(
			'server-serves',
			'^src/lib/server/',
			'^src/lib/(server|analysis|statistics|phylogeny|overlap|remarks|contracts|figures)/',
			'server never imports routes, components or worker entries. Shared shapes belong in contracts.'
		),
		room(
			'worker-is-a-shell',
			'^src/worker/',
			'^src/(worker|lib/(analysis|contracts|server|remarks))/',
			'A worker takes a message, calls analysis once, answers. Put the work in analysis.'
		),
		{
			name: 'packages-of-the-sciences',
			comment: 'The sciences use only the numerical packages. Anything else needs a decision record and a line here.',
			severity: 'error',
			from: { path: sciences, pathNot: tests },
			to: {
				path: 'node_modules/|^node:',
				pathNot: 'node_modules/(ml-matrix|simple-statistics|jstat)/'
			}
		},
		{
			name: 'sciences-without-node',
			comment: 'The sciences run in a browser too: no node module. Read files in server.',
			severity: 'error',
			from: { path: '^src/lib/(remarks|phylogeny|overlap|statistics|analysis|contracts)/', pathNot: tests },
			to: { dependencyTypes: ['core'] }
		},
		{
			name: 'sql-in-its-place',
			comment: 'SQL lives in server/db, server/repositories and server/jobs. Ask a repository.',
			severity: 'error',
			from: { path: '^src/', pathNot: '^src/lib/server/(db|repositories|jobs)/|[.]test[.]ts$' },
			to: { path: 'node_modules/(drizzle-orm|pg|pg-boss|@electric-sql)/' }
		},
		{
			name: 'server-only-from-server-files',
			comment:
				'A page or component gets its data from load; only +page.server.ts, +layout.server.ts and +server.ts may import server.',
			severity: 'error',
			from: {
				path: '^src/(routes|lib/components|lib/figures)/',
				pathNot: '([+][a-z]+[.]server|[+]server|[.]server|[.]test)[.]ts$'
			},
			to: { path: '^src/lib/server/' }
		},
		{
			name: 'no-tests-in-the-product',
			comment: 'The product never imports tests or fixtures. Move the shared part into src.',
			severity: 'error',
			from: { path: '^src/', pathNot: tests },
			to: { path: '^(tests|fixtures)/|[.](test|bench)[.]ts$' }
		},
		{
			name: 'no-unresolved',
			comment: 'An import that cannot be found.',
			severity: 'error',
			from: {},
			to: { couldNotResolve: true, pathNot: '^([$](app|env)/|[.]{1,2}/[$]types|virtual:)' }
		}
	],
	options: {
		doNotFollow: { path: 'node_modules' },
		exclude: { path: '[.]svelte-kit|^build/' },
		tsConfig: { fileName: 'tsconfig.json' },
		tsPreCompilationDeps: true,
		enhancedResolveOptions: {
			exportsFields: ['exports'],
			conditionNames: ['svelte', 'import', 'node', 'default', 'types'],
			extensions: ['.ts', '.js', '.mjs', '.svelte']
		}
	}
};
