import type { LogDetail, LoggedAction } from './repositories/logBook.ts';

/** What somebody did, after their name: “I. Lead made the study”. */
const WORDS: Readonly<Record<LoggedAction, string>> = {
	'account.registered': 'registered',
	'account.renamed': 'changed their name',
	'account.passphrase-changed': 'changed their passphrase',
	'account.passphrase-reset': 'got a new passphrase from the command line',
	'account.signed-in': 'signed in',
	'account.sign-in-refused': 'was refused at sign-in',
	'account.signed-out': 'signed out',
	'account.signed-out-everywhere': 'signed out everywhere',
	'access.refused': 'tried something their role does not allow',
	'token.made': 'made the token',
	'token.revoked': 'revoked the token',
	'lab.made': 'made the lab',
	'member.added': 'joined the lab',
	'member.role-changed': 'changed the role of a member',
	'member.removed': 'removed a member',
	'study.made': 'made the study',
	'study.changed': 'changed title or question of the study',
	'study.copied': 'copied an older study into',
	'study.deleted': 'deleted the study',
	'study.restored': 'brought back the study',
	'tree-set.added': 'kept the tree set',
	'tree-set.changed': 'changed a tree set',
	'tree-set.replaced': 'replaced an older tree set by',
	'tree-set.deleted': 'deleted a tree set',
	'tree-set.restored': 'brought back a tree set',
	'overlap-run.added': 'kept the overlap run',
	'overlap-run.changed': 'changed an overlap run',
	'overlap-run.replaced': 'replaced an older overlap run by',
	'overlap-run.deleted': 'deleted an overlap run',
	'overlap-run.restored': 'brought back an overlap run',
	'overlap-run.opened': 'first saw the values of the overlap run',
	'covariate.added': 'kept the covariate',
	'covariate.changed': 'changed a covariate',
	'covariate.replaced': 'replaced an older covariate by',
	'covariate.deleted': 'deleted a covariate',
	'covariate.restored': 'brought back a covariate',
	'niche-table.added': 'kept the niche table',
	'niche-table.changed': 'changed a niche table',
	'niche-table.replaced': 'replaced an older niche table by',
	'niche-table.deleted': 'deleted a niche table',
	'niche-table.restored': 'brought back a niche table',
	'name.decided': 'decided about names',
	'name.withdrawn': 'withdrew decisions about names',
	'analysis.declared': 'declared the plan of an analysis',
	'analysis.asked-for': 'asked for an analysis',
	'analysis.started': 'started an analysis',
	'analysis.finished': 'finished an analysis',
	'analysis.stopped': 'stopped an analysis',
	'analysis.failed': 'could not finish an analysis',
	'analysis.deleted': 'deleted an analysis',
	'analysis.restored': 'brought back an analysis',
	'report.made': 'saved the report',
	'report.changed': 'changed a report',
	'report.deleted': 'deleted a report',
	'report.restored': 'brought back a report',
	'report.signed-off': 'signed off a report',
	'report.unlocked': 'unlocked a report',
	exported: 'downloaded a file'
};

/** A line of the log book in words; names the thing when the entry does. */
export function logWords(action: string, detail: LogDetail): string {
	// The column holds text, so an entry of an older version may have an action this one does not know.
	const words = action in WORDS ? WORDS[action as LoggedAction] : action.replaceAll(/[.-]/g, ' ');
	const named = detail['label'] ?? detail['title'];
	if (action === 'name.decided' || action === 'name.withdrawn') return `${words}${countOf(detail['decisions'])}`;
	return typeof named === 'string' && named !== '' ? `${words} “${named}”` : words;
}

function countOf(decisions: unknown): string {
	return Array.isArray(decisions) ? ` (${decisions.length})` : '';
}
