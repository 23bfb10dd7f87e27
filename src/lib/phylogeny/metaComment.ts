/** Key under which a comment of the `[&&…]` dialect is kept, whole and unread. */
const OPAQUE = '&';

/**
 * What a metacomment `[&key=value,key={a,b},flag]` says, given without its brackets and its first `&`. Commas inside
 * `{}` or double quotes do not split. Values stay text: quotes are taken off, lists keep their braces, a flag has the
 * value ''. A body that starts with a second `&` is another dialect and is kept whole under the key `&`.
 */
export function parseMetaComment(body: string): [key: string, value: string][] {
	if (body.startsWith('&')) return [[OPAQUE, body.slice(1)]];
	return splitOutside(body)
		.map((part) => part.trim())
		.filter((part) => part !== '')
		.map(keyAndValue);
}

/** The two numbers of a list value `{a,b}`, such as the interval of a node age; undefined for anything else. */
export function numberPair(value: string): [number, number] | undefined {
	if (!value.startsWith('{') || !value.endsWith('}')) return undefined;
	const parts = value.slice(1, -1).split(',');
	if (parts.length !== 2 || parts.some((part) => part.trim() === '')) return undefined;
	const [low = NaN, high = NaN] = parts.map(Number);
	return Number.isFinite(low) && Number.isFinite(high) ? [low, high] : undefined;
}

function keyAndValue(part: string): [string, string] {
	const equals = part.indexOf('=');
	if (equals === -1) return [part, ''];
	const value = part.slice(equals + 1).trim();
	const isQuoted = value.length >= 2 && value.startsWith('"') && value.endsWith('"');
	return [part.slice(0, equals).trim(), isQuoted ? value.slice(1, -1) : value];
}

function splitOutside(body: string): string[] {
	const parts: string[] = [];
	let depth = 0;
	let isInQuotes = false;
	let from = 0;
	for (let i = 0; i < body.length; i++) {
		const character = body[i];
		if (character === '"') isInQuotes = !isInQuotes;
		else if (isInQuotes) continue;
		else if (character === '{') depth += 1;
		else if (character === '}') depth -= 1;
		else if (character === ',' && depth <= 0) {
			parts.push(body.slice(from, i));
			from = i + 1;
		}
	}
	parts.push(body.slice(from));
	return parts;
}
