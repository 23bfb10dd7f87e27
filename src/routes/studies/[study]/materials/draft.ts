import type { MaterialKind } from '#lib/contracts/materialForms.ts';
import type { Remark } from '#lib/remarks/remark.ts';
import type { ExcerptLine } from './excerpt.ts';
import type { Question } from './questions.ts';

/** A text that was looked at and is not kept yet. */
export type Draft = {
	/** file name; '' for a pasted text */
	readonly name: string;
	/** the text as given; '' where the page that asked still holds it */
	readonly text: string;
	readonly label: string;
	/** answers as they were given, by field */
	readonly answers: Readonly<Record<string, string>>;
	readonly seen: TreesSeen | MatrixSeen | CovariateSeen | NichesSeen | Refused;
	/** one sentence a field */
	readonly faults: Readonly<Record<string, string>>;
};

type Readable = {
	/** what it is, as a sentence begins: “A dated tree” */
	readonly headline: string;
	readonly facts: readonly string[];
	readonly remarks: readonly Remark[];
	readonly questions: readonly Question[];
};

export type TreesSeen = Readable & {
	readonly kind: 'trees';
	/** path of the first tree in the room of a tiny tree; null when it has no ages or is too large to draw */
	readonly drawing: string | null;
};

export type MatrixSeen = Readable & {
	readonly kind: 'matrix';
	readonly wing: WingSeen;
};

export type CovariateSeen = Readable & { readonly kind: 'covariate' };

export type NichesSeen = Readable & { readonly kind: 'niches' };

/** A wing to draw: every species with its name, or above a limit the averages of neighbours. */
export type WingSeen =
	| { readonly species: readonly string[]; readonly lower: readonly number[] }
	| { readonly rows: number; readonly lower: readonly (number | null)[] };

export type Refused = {
	readonly kind: 'refused';
	readonly readAs: MaterialKind | null;
	readonly code: string;
	readonly message: string;
	readonly excerpt: readonly ExcerptLine[];
	/** where the text is at fault, from 1; null when the whole is */
	readonly place: { readonly line: number; readonly column: number | null } | null;
};
