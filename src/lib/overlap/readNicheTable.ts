import { InputError } from '#lib/remarks/inputError.ts';
import { remark, type Remark } from '#lib/remarks/remark.ts';
import { cellNumber, decimalOf, isMissing } from './cellNumber.ts';
import { cellAt, rowCount, type CellTable } from './cellTable.ts';
import type { NicheRole, NicheTable, NicheVariable } from './nicheTable.ts';
import { readCells } from './readCells.ts';
import { readText } from './readText.ts';

const MOST_VARIABLES = 100;
const MOST_SPECIES = 2000;
/** A column of standard errors is named after its variable. */
const ERROR_NAME = /^(.+?)[\s_.-]*(?:se|s\.e\.|stderr|std[\s_.-]?error|standard[\s_.-]?error)$/i;
const ROLE_NAMES: readonly (readonly [NicheRole, RegExp])[] = [
	['records', /^(?:n|n[\s_.-]*records?|records?|record[\s_.-]*(?:count|number)|occurrences?|points?|samples?)$/i],
	['range-size', /(?:range|area)[\s_.-]*(?:size|area|km2)?$|^(?:eoo|aoo)$/i],
	['breadth', /breadth|width|tolerance|(?:^|[\s_.-])(?:sd|levins[\s_.-]?b)$/i]
];

/** A person's word on what columns tell, by column name; it overrules the guess. */
export type NicheRoles = Readonly<Record<string, NicheRole>>;

/**
 * Reads a table of niche positions: a first row of column names, then one row a species with its name in the first column
 * and numbers in the others. A column named like `temperature_se` holds the standard errors of `temperature`; columns
 * named like breadth, records or range size are taken as such, and said so.
 *
 * @param source - text or bytes, as `readMatrix`
 * @throws {InputError} codes of `readText` and `readCells`; `no-variables`, `too-few-rows`, `too-many-species`,
 * `too-many-variables`, `unnamed-column`, `duplicate-column`, `unnamed-species`, `duplicate-species`, `not-a-number`,
 * `negative-error`, `unknown-column` for a role given to no column
 */
export function readNicheTable(source: string | Uint8Array, roles: NicheRoles = {}): NicheTable {
	const decoded = readText(source);
	const table = readCells(decoded.text);
	refuseSize(table);
	const columns = columnNames(table);
	const species = speciesNames(table);
	const decimal =
		table.separator === ',' ? '.' : decimalOf(species.length * columns.length, (k) => cellOf(table, columns.length, k));
	const numbers = columns.map((name, column) => ({ name, values: columnNumbers(table, { name, column: column + 1, decimal }) }));
	const variables = pairWithErrors(numbers, roles);
	return {
		species,
		variables,
		remarks: [...decoded.remarks, ...roleRemarks(variables, roles), ...gapRemarks(variables, species)]
	};
}

function cellOf(table: CellTable, width: number, k: number): string {
	return cellAt(table, 1 + Math.floor(k / width), 1 + (k % width));
}

function refuseSize(table: CellTable): void {
	const rows = rowCount(table) - 1;
	if (rows < 1) {
		throw new InputError(
			'too-few-rows',
			'Expected a row of column names and one row for each species; the table has a single row.'
		);
	}
	if (rows > MOST_SPECIES) throw new InputError('too-many-species', `A table takes up to 2,000 species; this one has ${rows}.`);
	const columns = table.width - 1;
	if (columns < 1) {
		throw new InputError('no-variables', 'Expected at least one column of numbers beside the names; the table has names only.', {
			line: 1
		});
	}
	if (columns > MOST_VARIABLES) {
		throw new InputError('too-many-variables', `A table takes up to ${MOST_VARIABLES} variables; this one has ${columns}.`, {
			line: 1
		});
	}
}

function columnNames(table: CellTable): string[] {
	const names = Array.from({ length: table.width - 1 }, (_, column) => cellAt(table, 0, column + 1));
	if (names.every((name) => Number.isFinite(cellNumber(name, '.')))) {
		throw new InputError('unnamed-column', 'Expected names of the variables in the first row; it holds numbers only.', {
			line: 1
		});
	}
	for (const [index, name] of names.entries()) {
		const where = { line: 1, column: index + 2 };
		if (name === '')
			throw new InputError('unnamed-column', `Column ${index + 2} has values and no name: name it in the first row.`, where);
		if (names.indexOf(name) !== index) {
			throw new InputError('duplicate-column', `Two columns are named “${name}”: rename one.`, { ...where, name });
		}
	}
	return names;
}

function speciesNames(table: CellTable): string[] {
	const seen = new Map<string, number>();
	return Array.from({ length: rowCount(table) - 1 }, (_, index) => {
		const name = cellAt(table, index + 1, 0);
		const line = table.lines[index + 1] ?? 0;
		if (name === '') throw new InputError('unnamed-species', `Line ${line} has values and no species name.`, { line });
		const before = seen.get(name);
		if (before !== undefined) {
			throw new InputError(
				'duplicate-species',
				`“${name}” stands on line ${before} and again on line ${line}: keep one row a species.`,
				{
					line,
					name
				}
			);
		}
		seen.set(name, line);
		return name;
	});
}

type Column = { readonly name: string; readonly column: number; readonly decimal: '.' | ',' };

function columnNumbers(table: CellTable, { name, column, decimal }: Column): Float64Array {
	return Float64Array.from({ length: rowCount(table) - 1 }, (_, index) => {
		const cell = cellAt(table, index + 1, column);
		if (isMissing(cell)) return Number.NaN;
		const value = cellNumber(cell, decimal);
		if (Number.isFinite(value)) return value;
		const line = table.lines[index + 1] ?? 0;
		throw new InputError(
			'not-a-number',
			`Line ${line}, column “${name}”: “${cell}” is not a number. Leave a missing value blank or write NA; leave out columns of words.`,
			{ line, column: column + 1, name: cellAt(table, index + 1, 0) }
		);
	});
}

type Numbers = { readonly name: string; readonly values: Float64Array };

function pairWithErrors(columns: readonly Numbers[], roles: NicheRoles): NicheVariable[] {
	const unknown = Object.keys(roles).find((name) => columns.every((column) => column.name !== name));
	if (unknown !== undefined) throw new InputError('unknown-column', `The table has no column “${unknown}”.`, { name: unknown });
	const errorsOf = new Map<string, Float64Array>();
	for (const { name, values } of columns) {
		const base = baseOf(name, columns);
		if (base === null) continue;
		const negative = values.findIndex((value) => value < 0);
		if (negative >= 0)
			throw new InputError('negative-error', `A standard error in “${name}” is below 0: ${values[negative]}.`, { name });
		errorsOf.set(base, values);
	}
	return columns
		.filter(({ name }) => baseOf(name, columns) === null)
		.map(({ name, values }) => ({
			name,
			values,
			role: roles[name] ?? guessedRole(name),
			standardErrors: errorsOf.get(name) ?? null
		}));
}

/** The variable whose standard errors a column holds; null when it is a variable itself. */
function baseOf(name: string, columns: readonly Numbers[]): string | null {
	const stem = ERROR_NAME.exec(name)?.[1]?.toLowerCase();
	return stem === undefined ? null : (columns.find((column) => column.name.toLowerCase() === stem)?.name ?? null);
}

function guessedRole(name: string): NicheRole {
	return ROLE_NAMES.find(([, pattern]) => pattern.test(name))?.[0] ?? 'position';
}

const ROLE_WORDS: Readonly<Record<NicheRole, string>> = {
	position: 'a niche position',
	breadth: 'the breadth of the niche',
	records: 'the number of records',
	'range-size': 'the size of the range'
};

function roleRemarks(variables: readonly NicheVariable[], roles: NicheRoles): Remark[] {
	return variables
		.filter(({ name, role }) => role !== 'position' && roles[name] === undefined)
		.map(({ name, role }) =>
			remark(
				'look',
				'column-role',
				`“${name}” is taken as ${ROLE_WORDS[role]}, not as a niche position. Change it if that is wrong.`,
				{ name }
			)
		);
}

function gapRemarks(variables: readonly NicheVariable[], species: readonly string[]): Remark[] {
	return variables.flatMap(({ name, values }) => {
		const missing = species.filter((_, index) => Number.isNaN(values[index]));
		if (missing.length === 0) return [];
		const named = missing.slice(0, 5).join(', ');
		const more = missing.length > 5 ? `, and ${missing.length - 5} more` : '';
		return [
			remark(
				'look',
				'missing-values',
				`“${name}” has no value for ${named}${more}; those species are left out where it is used.`,
				{ name }
			)
		];
	});
}
