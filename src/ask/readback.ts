/**
 * READBACK: how every row was read, what is passed over, then what is wrong or looks wrong. One column of sentences.
 * Errors come as text, so that a workbook on a host that hides error messages still says what is the matter.
 */
import { say } from '../messages';
import { reviewBeam, type BeamArguments, type OpenBeam, type Review } from '../open';
import type { Issue } from '../issue';
import { sag, spanName, spansOf } from './spans';
import { unitOf, write } from './units';

/** Beyond these a number looks wrong for its kind (contract 4). */
const LARGE_SLOPE = 0.1; // rad: small-deflection theory is off by about slope^2/2 = 0.5 % there
const LARGE_DEFLECTION = 20; // span / deflection

/** `beam`, `names`, `values` as the host gives them. Never throws. */
export function readback(args: BeamArguments): string[][] {
  const review = reviewBeam({ beam: args.beam, names: args.names, values: args.values });
  const lines = review.readings.map(({ row, text }) => `Row ${row}: ${text}`);
  lines.push(...passedOver(review));
  lines.push(...review.issues.map(say));
  const cautions = [...review.cautions, ...(review.open === null ? [] : cautionsOf(review.open))];
  lines.push(...cautions.map((caution) => `Caution: ${say(caution)}`));
  lines.push(say({ code: 'standing-caution', kind: 'invalid' }));
  return lines.map((line) => [line]);
}

function passedOver({ table }: Review): string[] {
  const lines: string[] = [];
  const remarks = table.rows.filter((row) => row.kind === 'remark').map((row) => String(row.row));
  if (remarks.length > 0) {
    lines.push(
      remarks.length === 1
        ? `Ignored: row ${remarks[0] as string}, a remark.`
        : `Ignored: rows ${remarks.join(', ')}, remarks.`,
    );
  }
  const columns = table.layout.ignored.filter((name) => name !== '');
  if (columns.length > 0) {
    lines.push(
      `Ignored: the ${columns.length === 1 ? 'column' : 'columns'} ${columns.join(', ')} of your own.`,
    );
  }
  return lines;
}

/** What the solved beam itself warns of, everything acting: large slopes, large deflections, uplift at a support. */
export function cautionsOf(open: OpenBeam): Issue[] {
  const { model, response } = open;
  const length = unitOf(model, 'length');
  const place = (x: number): string => `${write(x)}${length === '' ? '' : ` ${length}`}`;
  const found: Issue[] = [];
  const slope = response.peak('slope', 'largest');
  if (Math.abs(slope.value) > LARGE_SLOPE) {
    found.push({
      code: 'large-slope',
      kind: 'invalid',
      expected: `at most ${LARGE_SLOPE} rad, as small-deflection theory assumes`,
      found: `${write(open.show('slope', slope.value))} rad`,
      detail: { x: place(slope.at) },
    });
  }
  for (const span of spansOf(model)) {
    const worst = sag(response, span);
    if (Math.abs(worst.value) * LARGE_DEFLECTION <= span.length) continue;
    const unit = unitOf(model, 'deflection');
    found.push({
      code: 'large-deflection',
      kind: 'invalid',
      expected: `at most span/${LARGE_DEFLECTION}`,
      found: `${write(open.show('deflection', worst.value))}${unit === '' ? '' : ` ${unit}`}`,
      detail: { span: spanName(model, span), x: place(worst.at) },
    });
  }
  const reactions = response.reactions();
  const most = Math.max(0, ...reactions.map((one) => Math.abs(one.force)));
  for (const one of reactions) {
    // a reaction of rounding size has no direction
    if (!(one.force < -1e-9 * most)) continue;
    const unit = unitOf(model, 'reaction');
    found.push({
      code: 'uplift',
      kind: 'invalid',
      expected: 'a support that pushes up, unless it is held down',
      found: `${write(one.force)}${unit === '' ? '' : ` ${unit}`}`,
      detail: { x: place(one.at) },
    });
  }
  return found;
}
