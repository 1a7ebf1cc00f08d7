/** Issue -> one sentence. The only place that words anything. */
import type { Issue } from './issue';

/** One sentence, e.g. "Row 3, Unit: expected kN/m, got kN." */
export function say(issue: Issue): string {
  const place = [issue.row === undefined ? '' : `row ${issue.row}`, issue.column ?? '']
    .filter(Boolean)
    .join(', ');
  const parts = [
    place === '' ? '' : `${place}: `,
    issue.code.replace(/-/g, ' '),
    issue.expected === undefined ? '' : `, expected ${issue.expected}`,
    issue.found === undefined ? '' : `, got ${issue.found}`,
    '.',
    issue.suggestion === undefined ? '' : ` Did you mean ${issue.suggestion}?`,
  ];
  const text = parts.join('');
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** The first message plus "and n more issues". */
export function sayAll(issues: readonly Issue[]): string {
  const [first, ...rest] = issues;
  if (first === undefined) return '';
  if (rest.length === 0) return say(first);
  return `${say(first)} (and ${rest.length} more ${rest.length === 1 ? 'issue' : 'issues'})`;
}
