import { z } from 'zod';
import {
	agesQuerySchema,
	analysisAnswerSchema,
	analysisStartedSchema,
	analysisStatusSchema,
	covariateAnswerSchema,
	covariateCreatedSchema,
	namesAnswerSchema,
	nicheTableAnswerSchema,
	overlapRunAnswerSchema,
	overlapRunCreatedSchema,
	plateQuerySchema,
	reportAnswerSchema,
	squareSchema,
	studiesAnswerSchema,
	studyAnswerSchema,
	studySchema,
	tokenAnswerSchema,
	treeQuerySchema,
	treeSetAnswerSchema,
	treeSetCreatedSchema
} from '#lib/contracts/answers.ts';
import {
	namesRequestSchema,
	overlapRunRequestSchema,
	studyRequestSchema,
	tokenRequestSchema,
	treeSetRequestSchema
} from '#lib/contracts/materials.ts';
import { covariateRequestSchema } from '#lib/contracts/covariates.ts';
import { nicheTableRequestSchema } from '#lib/contracts/nicheTables.ts';
import { planRequestSchema } from '#lib/contracts/plan.ts';
import { treeAboutSchema } from '#lib/contracts/treeAbout.ts';
import { reportRequestSchema } from '#lib/contracts/report.ts';

export type Answer = {
	readonly status: number;
	readonly means: string;
	/** media type → what it holds; a file has no schema */
	readonly content: Readonly<Record<string, z.ZodType | null>>;
};

/** One call of the API: the description, the readable page and the tests all come from this list. */
export type Call = {
	readonly method: 'get' | 'post' | 'put';
	readonly path: string;
	readonly id: string;
	/** one sentence */
	readonly does: string;
	readonly needsToken: boolean;
	readonly query?: z.ZodObject;
	readonly body?: z.ZodType;
	readonly answers: readonly Answer[];
	/** statuses of its problems, besides 401, 403, 404 and 405 */
	readonly refusals: readonly number[];
};

const json = (schema: z.ZodType) => ({ 'application/json': schema });
const file = (type: string) => ({ [type]: null });
const reading = { method: 'get', needsToken: true, refusals: [] } as const;

export const CALLS: readonly Call[] = [
	{
		method: 'post',
		path: '/tokens',
		id: 'createToken',
		does: 'Makes a token for scripts; it is shown this once.',
		needsToken: false,
		body: tokenRequestSchema,
		answers: [{ status: 201, means: 'The token', content: json(tokenAnswerSchema) }],
		refusals: [400, 413, 429]
	},
	{
		...reading,
		path: '/studies',
		id: 'listStudies',
		does: 'Lists the studies of your labs, the one changed last first.',
		answers: [{ status: 200, means: 'The studies', content: json(studiesAnswerSchema) }]
	},
	{
		method: 'post',
		path: '/studies',
		id: 'createStudy',
		does: 'Makes a study in a lab; without `lab`, in your own.',
		needsToken: true,
		body: studyRequestSchema,
		answers: [{ status: 201, means: 'The study', content: json(studySchema) }],
		refusals: [400, 413]
	},
	{
		...reading,
		path: '/studies/{study}',
		id: 'findStudy',
		does: 'A study with what it holds.',
		answers: [{ status: 200, means: 'The study', content: json(studyAnswerSchema) }]
	},
	{
		method: 'post',
		path: '/studies/{study}/tree-sets',
		id: 'createTreeSet',
		does: 'Reads and keeps a text of dated trees, Newick or NEXUS: up to 64 MiB, 10,000 trees, 10,000 tips a tree.',
		needsToken: true,
		body: treeSetRequestSchema,
		answers: [{ status: 201, means: 'Kept, with what was noticed', content: json(treeSetCreatedSchema) }],
		refusals: [400, 413, 422]
	},
	{
		...reading,
		path: '/tree-sets/{treeSet}',
		id: 'findTreeSet',
		does: 'One tree of a set with the ages of its nodes; `members=1` adds the names below each node, up to 2,000 tips.',
		query: treeQuerySchema,
		answers: [{ status: 200, means: 'The tree', content: json(treeSetAnswerSchema) }],
		refusals: [400, 422]
	},
	{
		method: 'put',
		path: '/tree-sets/{treeSet}/about',
		id: 'describeTreeSet',
		does: 'Says what only the author of a tree knows: species in the clade, how tips were placed, calibration, source.',
		needsToken: true,
		body: treeAboutSchema,
		answers: [{ status: 200, means: 'As it is kept now', content: json(treeAboutSchema) }],
		refusals: [400, 413]
	},
	{
		...reading,
		path: '/tree-sets/{treeSet}/mrca-ages',
		id: 'mrcaAges',
		does: 'Ages of the most recent common ancestors: JSON up to 2,000 tips, a streamed table for `Accept: text/csv`.',
		query: agesQuerySchema,
		answers: [{ status: 200, means: 'The ages', content: { ...json(squareSchema), ...file('text/csv') } }],
		refusals: [400, 422]
	},
	{
		method: 'post',
		path: '/studies/{study}/overlap-runs',
		id: 'createOverlapRun',
		does: 'Reads and keeps a species-by-species matrix, as numbers or as CSV: up to 2,000 species.',
		needsToken: true,
		body: overlapRunRequestSchema,
		answers: [{ status: 201, means: 'Kept, with what was noticed', content: json(overlapRunCreatedSchema) }],
		refusals: [400, 413, 422]
	},
	{
		...reading,
		path: '/overlap-runs/{overlapRun}',
		id: 'findOverlapRun',
		does: 'A run with its values, as similarities.',
		answers: [{ status: 200, means: 'The run', content: json(overlapRunAnswerSchema) }]
	},
	{
		method: 'post',
		path: '/studies/{study}/covariates',
		id: 'createCovariate',
		does: 'Reads and keeps a covariate: a matrix of numbers of 0 or more, or `places` (species, latitude, longitude) for distances in km.',
		needsToken: true,
		body: covariateRequestSchema,
		answers: [{ status: 201, means: 'Kept, with what was noticed', content: json(covariateCreatedSchema) }],
		refusals: [400, 413, 422]
	},
	{
		...reading,
		path: '/covariates/{covariate}',
		id: 'findCovariate',
		does: 'A covariate with its values, as given or computed.',
		answers: [{ status: 200, means: 'The covariate', content: json(covariateAnswerSchema) }]
	},
	{
		method: 'post',
		path: '/studies/{study}/niche-tables',
		id: 'createNicheTable',
		does: 'Reads and keeps a table of niche positions: one row a species, one column a variable, `x_se` for the standard errors of `x`.',
		needsToken: true,
		body: nicheTableRequestSchema,
		answers: [{ status: 201, means: 'Kept, with what was noticed', content: json(nicheTableAnswerSchema) }],
		refusals: [400, 413, 422]
	},
	{
		...reading,
		path: '/niche-tables/{nicheTable}',
		id: 'findNicheTable',
		does: 'A table of niche positions with its values.',
		answers: [{ status: 200, means: 'The table', content: json(nicheTableAnswerSchema) }]
	},
	{
		...reading,
		path: '/studies/{study}/names',
		id: 'findNames',
		does: 'The decisions about names in force, and how the newest tree set and run agree under them.',
		answers: [{ status: 200, means: 'The names', content: json(namesAnswerSchema) }]
	},
	{
		method: 'put',
		path: '/studies/{study}/names',
		id: 'decideNames',
		does: 'Puts exactly these decisions in force; `to: null` leaves a species out.',
		needsToken: true,
		body: namesRequestSchema,
		answers: [{ status: 200, means: 'The names', content: json(namesAnswerSchema) }],
		refusals: [400, 413, 422]
	},
	{
		method: 'post',
		path: '/studies/{study}/analyses',
		id: 'createAnalysis',
		does: 'Writes a plan down and runs it. An equal plan on equal inputs, seed given, is answered by the analysis it has.',
		needsToken: true,
		body: planRequestSchema,
		answers: [
			{ status: 202, means: 'It waits or works', content: json(analysisStartedSchema) },
			{ status: 200, means: 'An equal one has finished', content: json(analysisStartedSchema) }
		],
		refusals: [400, 413, 422]
	},
	{
		...reading,
		path: '/analyses/{analysis}',
		id: 'findAnalysis',
		does: 'An analysis: its plan, how far it is, and its result once it has finished.',
		answers: [{ status: 200, means: 'The analysis', content: json(analysisAnswerSchema) }]
	},
	{
		method: 'post',
		path: '/analyses/{analysis}/stop',
		id: 'stopAnalysis',
		does: 'Stops an analysis that waits or works; one that is over stays as it is.',
		needsToken: true,
		answers: [{ status: 200, means: 'Its status now', content: json(analysisStatusSchema) }],
		refusals: []
	},
	{
		...reading,
		path: '/analyses/{analysis}/events',
		id: 'watchAnalysis',
		does: 'Server-sent events: `progress` while it works, then `finished`, `stopped` or `failed`.',
		answers: [{ status: 200, means: 'The events', content: file('text/event-stream') }]
	},
	{
		...reading,
		path: '/analyses/{analysis}/plate.{format}',
		id: 'drawPlate',
		does: 'The plate as svg, pdf or png; `width` in mm, `type` in pt, `age` is where the present stands.',
		query: plateQuerySchema,
		answers: [
			{ status: 200, means: 'The plate', content: { ...file('image/svg+xml'), ...file('application/pdf'), ...file('image/png') } }
		],
		refusals: [400, 422]
	},
	{
		...reading,
		path: '/analyses/{analysis}/pairs.csv',
		id: 'listPairs',
		does: 'Every pair of species: species_a, species_b, age, overlap.',
		answers: [{ status: 200, means: 'The table', content: file('text/csv') }],
		refusals: [422]
	},
	{
		...reading,
		path: '/analyses/{analysis}/nodes.csv',
		id: 'listNodes',
		does: 'Every node of the tree: node, age, tips, pairs, nested, plain.',
		answers: [{ status: 200, means: 'The table', content: file('text/csv') }],
		refusals: [422]
	},
	{
		...reading,
		path: '/analyses/{analysis}/clades.csv',
		id: 'listClades',
		does: 'Every clade that the plan asked about, with both p-values; the headings alone where it asked about none.',
		answers: [{ status: 200, means: 'The table', content: file('text/csv') }],
		refusals: [422]
	},
	{
		method: 'post',
		path: '/analyses/{analysis}/reports',
		id: 'createReport',
		does: 'Saves a finished analysis as a report; without `caption`, with the caption written for its result.',
		needsToken: true,
		body: reportRequestSchema,
		answers: [{ status: 201, means: 'The report', content: json(reportAnswerSchema) }],
		refusals: [400, 413, 422]
	},
	{
		...reading,
		path: '/analyses/{analysis}/report.pdf',
		id: 'printReport',
		does: 'The newest report on A4: title, finding, plate and caption; `report` chooses an older one.',
		query: z.object({ report: z.string().optional() }),
		answers: [{ status: 200, means: 'The report', content: file('application/pdf') }],
		refusals: [422]
	},
	{
		...reading,
		path: '/openapi.json',
		id: 'describeApi',
		does: 'This description.',
		needsToken: false,
		answers: [{ status: 200, means: 'OpenAPI 3.1', content: { 'application/json': null } }]
	}
];
