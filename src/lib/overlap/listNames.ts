/** Names in quotation marks, joined as a sentence would: “A”, “B” and 3 more. */
export function listNames(names: readonly string[], most = 5): string {
	const shown = names.slice(0, most).map((name) => `“${name}”`);
	const rest = names.length - shown.length;
	if (rest > 0) return `${shown.join(', ')} and ${rest.toLocaleString('en')} more`;
	const last = shown.pop() ?? '';
	return shown.length === 0 ? last : `${shown.join(', ')} and ${last}`;
}
