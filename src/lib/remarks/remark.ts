/** How much a remark asks of a person: nothing, a look, or a decision before an analysis may run. */
export type RemarkLevel = 'information' | 'look' | 'settle';

/** Where in the material a remark points. Lines and columns count from 1, in characters of the text as given. */
export type Place = {
	readonly line?: number;
	readonly column?: number;
	readonly name?: string;
	readonly otherName?: string;
	readonly tree?: number;
	readonly file?: string;
};

/**
 * What the program noticed about a material. `code` is stable and lower-case with dashes; `message` is a whole
 * sentence that says what was found, where, and what to do.
 */
export type Remark = {
	readonly level: RemarkLevel;
	readonly code: string;
	readonly message: string;
	readonly where?: Place;
};

export function remark(level: RemarkLevel, code: string, message: string, where?: Place): Remark {
	return where === undefined ? { level, code, message } : { level, code, message, where };
}
