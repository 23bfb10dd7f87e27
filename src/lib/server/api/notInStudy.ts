import { Refusal } from './refusal.ts';

export function notInStudy(what: string, id: string): Refusal {
	return new Refusal(404, 'not-found', `Expected the id of a ${what} of this study; “${id}” is none, or it was deleted.`);
}
