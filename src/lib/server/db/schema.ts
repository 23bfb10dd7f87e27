import {
	bigint,
	bigserial,
	boolean,
	index,
	integer,
	jsonb,
	pgTable,
	primaryKey,
	text,
	timestamp,
	uniqueIndex
} from 'drizzle-orm/pg-core';
import type { AnalysisProgress, AnalysisResult } from '#lib/contracts/analysisResult.ts';
import type { CovariateReadingNotes } from '#lib/contracts/covariates.ts';
import type { Measure } from '#lib/contracts/measure.ts';
import type { Plan } from '#lib/contracts/plan.ts';
import type { PlanContext } from '#lib/contracts/planContext.ts';
import type { StoredNicheVariable } from '#lib/contracts/nicheTables.ts';
import type { TreeAbout } from '#lib/contracts/treeAbout.ts';
import type { FigureSettings } from '#lib/contracts/report.ts';
import type { AgeUnit, AnalysisStatus, TreeSetKind } from '#lib/contracts/materials.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import { bytea, createdAt, deletedAt, id } from './columns.ts';
import { labs, users } from './peopleTables.ts';

export * from './peopleTables.ts';

export const studies = pgTable(
	'studies',
	{
		id: id(),
		labId: text('lab_id')
			.notNull()
			.references(() => labs.id, { onDelete: 'cascade' }),
		title: text('title').notNull(),
		question: text('question').notNull().default(''),
		createdBy: text('created_by')
			.notNull()
			.references(() => users.id),
		/** an example study ships with the program and may be read without an account */
		isExample: boolean('is_example').notNull().default(false),
		createdAt: createdAt(),
		changedAt: timestamp('changed_at', { withTimezone: true }).notNull().defaultNow(),
		deletedAt: deletedAt()
	},
	(table) => [index('studies_lab').on(table.labId)]
);

/** A text as given, gzip-compressed and cut into chunks of 256 KiB, addressed by the SHA-256 of its bytes. */
export const texts = pgTable('texts', {
	hash: text('hash').primaryKey(),
	bytes: bigint('bytes', { mode: 'number' }).notNull(),
	createdAt: createdAt()
});

export const textChunks = pgTable(
	'text_chunks',
	{
		hash: text('hash')
			.notNull()
			.references(() => texts.hash, { onDelete: 'cascade' }),
		position: integer('position').notNull(),
		data: bytea('data').notNull()
	},
	(table) => [primaryKey({ columns: [table.hash, table.position] })]
);

export const treeSets = pgTable(
	'tree_sets',
	{
		id: id(),
		studyId: text('study_id')
			.notNull()
			.references(() => studies.id, { onDelete: 'cascade' }),
		label: text('label').notNull(),
		textHash: text('text_hash')
			.notNull()
			.references(() => texts.hash),
		ageUnit: text('age_unit').$type<AgeUnit>().notNull(),
		kind: text('kind').$type<TreeSetKind>().notNull(),
		treeCount: integer('tree_count').notNull(),
		/** of the first tree */
		summary: jsonb('summary')
			.$type<{ tipCount: number; ultrametricSpread: number | null; polytomies: number; rootAge: number | null; tips: string[] }>()
			.notNull(),
		remarks: jsonb('remarks').$type<Remark[]>().notNull(),
		/** the person said: extend terminal branches so that all tips end together */
		spreadConfirmed: boolean('spread_confirmed').notNull().default(false),
		/** what only its author knows; null when nobody has said anything */
		about: jsonb('about').$type<TreeAbout>(),
		/** the material this one replaces */
		replaces: text('replaces'),
		createdBy: text('created_by')
			.notNull()
			.references(() => users.id),
		createdAt: createdAt(),
		deletedAt: deletedAt()
	},
	(table) => [index('tree_sets_study').on(table.studyId)]
);

export const overlapRuns = pgTable(
	'overlap_runs',
	{
		id: id(),
		studyId: text('study_id')
			.notNull()
			.references(() => studies.id, { onDelete: 'cascade' }),
		label: text('label').notNull(),
		measure: text('measure').$type<Measure>().notNull(),
		/** the matrix text as given; null for a run computed here */
		textHash: text('text_hash').references(() => texts.hash),
		species: jsonb('species').$type<string[]>().notNull(),
		/** strict lower triangle, row by row, little-endian float64, NaN where a pair is missing */
		lower: bytea('lower').notNull(),
		/** how the text was read: shape, kind, scale, triangle, separator */
		reading: jsonb('reading').$type<Record<string, unknown>>().notNull(),
		remarks: jsonb('remarks').$type<Remark[]>().notNull(),
		replaces: text('replaces'),
		createdBy: text('created_by')
			.notNull()
			.references(() => users.id),
		createdAt: createdAt(),
		deletedAt: deletedAt()
	},
	(table) => [index('overlap_runs_study').on(table.studyId)]
);

/** A species-by-species matrix that may go with both age and overlap, such as geographic distance. */
export const covariates = pgTable(
	'covariates',
	{
		id: id(),
		studyId: text('study_id')
			.notNull()
			.references(() => studies.id, { onDelete: 'cascade' }),
		label: text('label').notNull(),
		/** the text as given: a matrix, or a table of places */
		textHash: text('text_hash')
			.notNull()
			.references(() => texts.hash),
		species: jsonb('species').$type<string[]>().notNull(),
		/** as `overlap_runs.lower`: values as given or computed, not turned into similarities */
		lower: bytea('lower').notNull(),
		/** where the values come from and how the text was read */
		reading: jsonb('reading').$type<CovariateReadingNotes>().notNull(),
		remarks: jsonb('remarks').$type<Remark[]>().notNull(),
		replaces: text('replaces'),
		createdBy: text('created_by')
			.notNull()
			.references(() => users.id),
		createdAt: createdAt(),
		deletedAt: deletedAt()
	},
	(table) => [index('covariates_study').on(table.studyId)]
);

/** Niche positions of species, and what goes with them, such as breadth and number of records. */
export const nicheTables = pgTable(
	'niche_tables',
	{
		id: id(),
		studyId: text('study_id')
			.notNull()
			.references(() => studies.id, { onDelete: 'cascade' }),
		label: text('label').notNull(),
		textHash: text('text_hash')
			.notNull()
			.references(() => texts.hash),
		species: jsonb('species').$type<string[]>().notNull(),
		variables: jsonb('variables').$type<StoredNicheVariable[]>().notNull(),
		remarks: jsonb('remarks').$type<Remark[]>().notNull(),
		replaces: text('replaces'),
		createdBy: text('created_by')
			.notNull()
			.references(() => users.id),
		createdAt: createdAt(),
		deletedAt: deletedAt()
	},
	(table) => [index('niche_tables_study').on(table.studyId)]
);

/** One row per name in the data; the newest wins, older ones stay as history. */
export const nameDecisions = pgTable(
	'name_decisions',
	{
		id: bigserial('id', { mode: 'number' }).primaryKey(),
		studyId: text('study_id')
			.notNull()
			.references(() => studies.id, { onDelete: 'cascade' }),
		fromName: text('from_name').notNull(),
		/** tip label; null leaves the species out */
		toTip: text('to_tip'),
		why: text('why').notNull().default(''),
		/** an undone decision is withdrawn, not erased */
		withdrawn: boolean('withdrawn').notNull().default(false),
		decidedBy: text('decided_by')
			.notNull()
			.references(() => users.id),
		createdAt: createdAt()
	},
	(table) => [index('name_decisions_study').on(table.studyId)]
);

export const analyses = pgTable(
	'analyses',
	{
		id: id(),
		studyId: text('study_id')
			.notNull()
			.references(() => studies.id, { onDelete: 'cascade' }),
		treeSetId: text('tree_set_id')
			.notNull()
			.references(() => treeSets.id),
		overlapRunId: text('overlap_run_id')
			.notNull()
			.references(() => overlapRuns.id),
		plan: jsonb('plan').$type<Plan>().notNull(),
		/** SHA-256 of the plan and of every input it runs on */
		hash: text('hash').notNull(),
		/** name decisions in force when it was asked for */
		decisions: jsonb('decisions').$type<{ from: string; to: string | null; why?: string }[]>().notNull(),
		status: text('status').$type<AnalysisStatus>().notNull(),
		progress: jsonb('progress').$type<AnalysisProgress>(),
		result: jsonb('result').$type<AnalysisResult>(),
		/** the sentence a failed or refused run leaves */
		failure: jsonb('failure').$type<{ code: string; message: string; reference?: string }>(),
		declaredAt: timestamp('declared_at', { withTimezone: true }),
		/** what had been seen of the matrix when the plan was written down; null for plans of before this was kept */
		context: jsonb('context').$type<PlanContext>(),
		createdBy: text('created_by')
			.notNull()
			.references(() => users.id),
		createdAt: createdAt(),
		startedAt: timestamp('started_at', { withTimezone: true }),
		/** renewed while a worker holds the analysis; see jobs/heartbeat */
		heartbeatAt: timestamp('heartbeat_at', { withTimezone: true }),
		finishedAt: timestamp('finished_at', { withTimezone: true }),
		deletedAt: deletedAt()
	},
	(table) => [index('analyses_study').on(table.studyId), uniqueIndex('analyses_hash').on(table.studyId, table.hash)]
);

export const reports = pgTable(
	'reports',
	{
		id: id(),
		studyId: text('study_id')
			.notNull()
			.references(() => studies.id, { onDelete: 'cascade' }),
		analysisId: text('analysis_id')
			.notNull()
			.references(() => analyses.id),
		title: text('title').notNull(),
		caption: text('caption').notNull(),
		captionEdited: boolean('caption_edited').notNull().default(false),
		notes: text('notes').notNull().default(''),
		figure: jsonb('figure').$type<FigureSettings>().notNull(),
		createdBy: text('created_by')
			.notNull()
			.references(() => users.id),
		createdAt: createdAt(),
		changedAt: timestamp('changed_at', { withTimezone: true }).notNull().defaultNow(),
		deletedAt: deletedAt()
	},
	(table) => [index('reports_study').on(table.studyId)]
);

/** Append-only: rows are never changed or deleted (a trigger refuses it). Each carries the hash of the one before. */
export const logEntries = pgTable(
	'log_entries',
	{
		id: bigserial('id', { mode: 'number' }).primaryKey(),
		at: timestamp('at', { withTimezone: true }).notNull().defaultNow(),
		/** null for something no account did, such as a refused sign-in */
		userId: text('user_id'),
		labId: text('lab_id'),
		studyId: text('study_id'),
		action: text('action').notNull(),
		detail: jsonb('detail').$type<Record<string, unknown>>().notNull(),
		previousHash: text('previous_hash').notNull(),
		hash: text('hash').notNull()
	},
	(table) => [index('log_entries_study').on(table.studyId), index('log_entries_lab').on(table.labId)]
);
