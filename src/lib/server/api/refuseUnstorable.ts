import { Refusal } from './refusal.ts';

/** The database stores no NUL character and no half of a surrogate pair: both are refused before they get that far. */
export function isStorable(text: string): boolean {
	return !text.includes('\0') && text.isWellFormed();
}

/**
 * @param value - parsed JSON, walked without recursion so that deep nesting cannot overflow the stack
 * @throws {Refusal} 400 `unstorable-character`
 */
export function refuseUnstorable(value: unknown): void {
	const rest: unknown[] = [value];
	while (rest.length > 0) {
		const next = rest.pop();
		if (typeof next === 'string') refuseText(next);
		else if (Array.isArray(next)) pushAll(rest, next);
		else if (typeof next === 'object' && next !== null) pushAll(rest, Object.entries(next).flat());
	}
}

function pushAll(rest: unknown[], values: readonly unknown[]): void {
	for (const value of values) if (typeof value === 'string' || typeof value === 'object') rest.push(value);
}

function refuseText(text: string): void {
	if (isStorable(text)) return;
	const shown = JSON.stringify(text.slice(0, 60));
	throw new Refusal(
		400,
		'unstorable-character',
		`Expected text without NUL characters or broken surrogate pairs; found one in ${shown}.`
	);
}
