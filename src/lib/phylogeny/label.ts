const PLAIN = /^[^\s()[\]':;,"][^\s()[\]':;,]*$/;
const SINGLE_QUOTED = /^'(?:[^']|'')*'$/;
const LINE_BREAK = /\s*[\r\n]+\s*/g;

/**
 * A label as shown: quotes taken off and doubled ones made single; a line break inside quotes is one blank; an underscore
 * is a blank only in an unquoted label.
 */
export function labelShown(labelRaw: string): string {
	const quote = labelRaw[0];
	if (quote === "'" || quote === '"')
		return labelRaw
			.slice(1, -1)
			.replaceAll(quote + quote, quote)
			.replace(LINE_BREAK, ' ');
	return labelRaw.includes('_') ? labelRaw.replaceAll('_', ' ') : labelRaw;
}

/**
 * How to write a label into a tree text so that it reads back as the same label: the given spelling where it does and is
 * standard, else the label itself, quoted when it has to be.
 */
export function labelSpelling(label: string, labelRaw: string): string {
	const isStandard = PLAIN.test(labelRaw) || SINGLE_QUOTED.test(labelRaw);
	if (isStandard && labelShown(labelRaw) === label) return labelRaw;
	if (label === '' || (PLAIN.test(label) && !label.includes('_'))) return label;
	return `'${label.replaceAll("'", "''")}'`;
}
