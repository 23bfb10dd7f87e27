/** `npm run worker`: a worker process of its own, beside the web processes of a PostgreSQL server. */
import { runCommand } from '#lib/server/runCommand.ts';
import { workAlone } from '../worker/standalone.ts';

await runCommand(workAlone);
