/**
 * `npm run bench:kernel`: the table of speed that README shows. Every row is a ratio measured in this one run, the sides
 * in turns, as CPU time of one thread, because other work on the machine distorts the clock on the wall; the row of two
 * threads alone is by the clock. Rows beside C and R appear where gcc and R with vegan are installed.
 */
import { cpus } from 'node:os';
import { besideC } from './rows/besideC.ts';
import { besideVegan } from './rows/besideVegan.ts';
import { growth } from './rows/growth.ts';
import { manyClades } from './rows/manyClades.ts';
import { nodeAveragesRow } from './rows/nodeAveragesRow.ts';
import { parsing } from './rows/parsing.ts';
import { plainLoop } from './rows/plainLoop.ts';
import { posterior } from './rows/posterior.ts';
import type { Row } from './rows/row.ts';
import { twoThreads } from './rows/twoThreads.ts';

const ROWS: readonly (() => Row | null | Promise<Row | null>)[] = [
	besideVegan,
	plainLoop,
	besideC,
	nodeAveragesRow,
	growth,
	twoThreads,
	manyClades,
	posterior,
	parsing
];
const only = process.argv[2];

process.stdout.write(`${cpus().length} cores of ${cpus()[0]?.model ?? 'an unknown processor'}, Node ${process.version}\n\n`);
process.stdout.write('| work | against | measured | wanted |\n| --- | --- | --- | --- |\n');
for (const measure of ROWS) {
	if (only !== undefined && measure.name !== only) continue;
	const row = await measure();
	if (row) process.stdout.write(`| ${row.work} | ${row.against} | ${row.measured} | ${row.wanted} |\n`);
}
