export type NameAlignment = {
	readonly species: readonly string[];
	/** shape (rows,); index of each row's species */
	readonly rowSpecies: readonly number[];
	/** shape (columns,); index of each column's species */
	readonly columnSpecies: readonly number[];
	readonly onlyRows: readonly string[];
	readonly onlyColumns: readonly string[];
	/** columns that were paired with a row of another spelling */
	readonly respelled: number;
};

/**
 * Gives rows and columns of a square to the same species by name. Statistical programs write “Parus.major” for a column
 * called “Parus major”: when such respelling pairs all that is left over, one to one, it is taken.
 */
export function alignNames(rowNames: readonly string[], columnNames: readonly string[]): NameAlignment {
	const respelling = respellings(rowNames, columnNames);
	const columns = columnNames.map((name) => respelling.get(name) ?? name);
	const inRows = new Set(rowNames);
	const inColumns = new Set(columns);
	const onlyRows = rowNames.filter((name) => !inColumns.has(name));
	const onlyColumns = columns.filter((name) => !inRows.has(name));
	const species = speciesOrder(rowNames, columns, { onlyRows, onlyColumns });
	const index = new Map(species.map((name, position) => [name, position]));
	const indexOf = (name: string) => index.get(name) ?? -1;
	return {
		species,
		rowSpecies: rowNames.map(indexOf),
		columnSpecies: columns.map(indexOf),
		onlyRows,
		onlyColumns,
		respelled: respelling.size
	};
}

/** The order of the rows; of the columns when a lower half without diagonal has no row for its first species. */
function speciesOrder(
	rows: readonly string[],
	columns: readonly string[],
	rest: { onlyRows: readonly string[]; onlyColumns: readonly string[] }
): string[] {
	const lower = rest.onlyColumns.length > 0 && rest.onlyColumns[0] === columns[0];
	return lower ? [...columns, ...rest.onlyRows] : [...rows, ...rest.onlyColumns];
}

/** From column name to row name, empty unless every left-over name finds exactly one partner. */
function respellings(rowNames: readonly string[], columnNames: readonly string[]): Map<string, string> {
	const inRows = new Set(rowNames);
	const inColumns = new Set(columnNames);
	const leftRows = rowNames.filter((name) => !inColumns.has(name));
	const leftColumns = columnNames.filter((name) => !inRows.has(name));
	const byKey = new Map(leftRows.map((name) => [respellingKey(name), name]));
	const found = new Map<string, string>();
	for (const name of leftColumns) {
		const partner = byKey.get(respellingKey(name));
		if (partner !== undefined) found.set(name, partner);
	}
	const oneToOne = byKey.size === leftRows.length && new Set(found.values()).size === leftColumns.length;
	return oneToOne && leftRows.length === leftColumns.length ? found : new Map();
}

function respellingKey(name: string): string {
	return name
		.normalize('NFC')
		.toLowerCase()
		.replace(/[^\p{L}\p{N}]+/gu, ' ')
		.replace(/^x (?=\d)/, '')
		.trim();
}
