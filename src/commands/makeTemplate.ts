/** Part of `npm run build`: makes the prepared database that a new data folder starts from. */
import { builtTemplates, makeTemplate } from '#lib/server/db/template.ts';
import { runCommand } from '#lib/server/runCommand.ts';

await runCommand(async () => {
	await makeTemplate(builtTemplates());
});
