import type { Access } from '#lib/server/access.ts';
import * as logBook from '#lib/server/repositories/logBook.ts';

type Exported = { readonly analysis: string; readonly file: string; readonly report?: string };

/** Everything that leaves as a file is in the log book. */
export function noteExport(access: Access, exported: Exported): Promise<void> {
	return logBook.append(access, { action: 'exported', detail: exported });
}
