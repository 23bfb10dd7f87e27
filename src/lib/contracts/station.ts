/** Where one step of a study stands. */
export type StationState = 'not-started' | 'needs-you' | 'ready' | 'out-of-date';

/** A step of a study on its home page and in the margin: a sentence of fact and where it leads. */
export type Station = {
	readonly key: 'materials' | 'names' | 'overlaps' | 'analyses' | 'reports';
	readonly title: string;
	readonly fact: string;
	readonly state: StationState;
	readonly href: string;
};
