import type { Remark } from '#lib/remarks/remark.ts';
import type { SpellingDifference } from './spelling.ts';

/** What a person chose about one name. `from` is a species of the data; with `to` null it may be a tip of the tree too. */
export type NameDecision = {
	readonly from: string;
	/** tip label; null leaves the name out */
	readonly to: string | null;
	readonly why?: string | undefined;
};

export type NameRowKind = 'exact' | 'tidied' | 'probable' | 'only-in-tree' | 'only-in-data' | 'twice';

/** One line of the names page: a species, a tip, or both, and how they relate. */
export type NameRow = {
	readonly species?: string;
	readonly tip?: string;
	readonly kind: NameRowKind;
	/** in words, without a full stop: “one letter apart” */
	readonly reason: string;
	/** nothing is asked of a person any more */
	readonly settled: boolean;
	readonly decision?: NameDecision;
	/** where the two names differ, for underlining; only beside a probable match */
	readonly differences?: SpellingDifference;
	/** the tips a person may choose from, when there is more than one claim */
	readonly candidates?: readonly string[];
};

export type MatchedPair = { readonly species: string; readonly tip: string };
export type DroppedName = { readonly name: string; readonly in: 'tree' | 'data'; readonly why: string };

export type NameCounts = {
	readonly tips: number;
	readonly species: number;
	/** pairs in use */
	readonly pairs: number;
	/** rows that still ask something of a person */
	readonly open: number;
	readonly byKind: Readonly<Record<NameRowKind, number>>;
};

export type NameMatching = {
	/** species in the order of the data, then tips without one in the order of the tree */
	readonly rows: readonly NameRow[];
	/** what an analysis uses now, in the order of the data */
	readonly pairs: readonly MatchedPair[];
	readonly dropped: readonly DroppedName[];
	readonly counts: NameCounts;
	readonly sentence: string;
	readonly remarks: readonly Remark[];
};
