// The margin chart: every assumption as a bar of its error over its limit, on a
// logarithmic scale around 1.

import { h, s, picture } from './dom.js';
import { times, ends, share, quantityShown } from './quantity.js';

const decades = 3; // shown on either side of the limit
const order = ['invalid', 'marginal', 'undetermined', 'valid'];
const words = { valid: 'valid', marginal: 'marginal', invalid: 'invalid', undetermined: 'undetermined', 'not-applicable': 'cannot occur' };

// place is where a utilisation stands on the scale, from 0 to 1.
const place = (u) => Math.min(1, Math.max(0, (Math.log10(u) + decades) / (2 * decades)));
const percent = (x) => `${(100 * x).toFixed(2)}%`;

// margins draws the chart of an answer.
export function margins(a, answer) {
  const all = Object.entries(a.findings);
  const judged = all.filter(([, f]) => f.verdict !== 'not-applicable').sort(([, x], [, y]) => order.indexOf(x.verdict) - order.indexOf(y.verdict) || (x.margin ?? 0) - (y.margin ?? 0));
  const moot = all.filter(([, f]) => f.verdict === 'not-applicable');
  return h('div', { class: 'margins' },
    h('p', { class: 'quiet' }, 'Error over limit of each assumption. The full bar ends at u/φ and the pale one at u·φ, φ the model-form factor: by how much a real shape may differ from the solved one. A bar that ends left of the line is valid; where the pale part crosses it, marginal.'),
    h('div', { class: 'margin axis', 'aria-hidden': 'true' }, h('span', {}, 'Verdict'), h('span', {}, 'Assumption'), axis(), h('span', { class: 'number' }, 'error/limit')),
    h('ul', {}, judged.map(([id, f]) => row(id, f, answer))),
    moot.length > 0 && h('details', { class: 'fold', id: 'moot' }, h('summary', {}, `${moot.length} that cannot occur here`),
      h('ul', { class: 'moot' }, moot.map(([id, f]) => h('li', { id: 'finding-' + id, tabindex: '-1' }, picture('mark-not-applicable', 'mark'), h('span', {}, h('b', {}, f.title), ' ', f.because))))));
}

function axis() {
  const ticks = Array.from({ length: 2 * decades + 1 }, (_, i) => i - decades);
  const text = (d) => (d < 0 ? `0.${'0'.repeat(-d - 1)}1` : `1${'0'.repeat(d)}`);
  const anchor = (d) => (d === -decades ? 'start' : d === decades ? 'end' : 'middle');
  return s('svg', { class: 'scale', height: 16 }, ticks.map((d) => s('text', { x: percent(place(10 ** d)), y: 12, 'text-anchor': anchor(d), class: 'decade' + d }, Math.abs(d) === 2 ? '' : text(d))));
}

function row(id, f, answer) {
  const known = typeof f.utilisation === 'number';
  const tail = known ? [times(f.utilisation), h('span', { class: 'unseen' }, ' of the limit')] : 'no value';
  return h('li', { class: f.verdict, id: 'finding-' + id }, h('details', { id: 'about-' + id },
    h('summary', { class: 'margin' },
      h('span', { class: 'verdict' }, picture('mark-' + f.verdict, 'mark'), ' ', words[f.verdict]),
      h('span', { class: 'what' }, f.title, !f.of_interest && h('span', { class: 'tag' }, 'not of interest')),
      known ? bar(f) : h('span', { class: 'nobar' }),
      h('span', { class: 'number' }, tail)),
    about(f, answer)));
}

function bar(f) {
  const low = place(f.utilisation / f.factor);
  const high = place(f.utilisation * f.factor);
  const at = place(f.utilisation);
  const grid = Array.from({ length: 2 * decades - 1 }, (_, i) => percent((i + 1) / (2 * decades)));
  return s('svg', { class: 'bar', height: 18, 'aria-hidden': 'true' },
    grid.map((x) => s('line', { x1: x, x2: x, y1: 0, y2: 18, class: 'grid' })),
    s('rect', { x: 0, y: 5, height: 8, width: percent(Math.max(low, 0.006)), class: 'full' }),
    high > low && s('rect', { x: percent(low), y: 5.5, height: 7, width: percent(high - low), class: 'band' }),
    s('line', { x1: '50%', x2: '50%', y1: 0, y2: 18, class: 'limit' }),
    at > 0 && at < 1 && s('line', { x1: percent(at), x2: percent(at), y1: 2, y2: 16, class: 'point' }));
}

// about tells what stands behind a bar.
function about(f, answer) {
  return h('div', { class: 'about' },
    h('p', {}, f.because),
    h('p', {}, 'Leaves out ', f.leaves_out, '.'),
    f.needs?.length > 0 && h('p', {}, 'Needs ', answer.inputs(f.needs), '.'),
    f.holds_up_to?.length > 0 && h('p', {}, 'Holds with ', f.holds_up_to.map((x) => `${x.input} ${x.bound ?? 'up to'} ${quantityShown(x.value, x.unit)}`).join('; '), '.'),
    f.drivers?.length > 0 && h('p', {}, 'Driven by ', f.drivers.map((d) => `${d.input} (to the power ${d.sensitivity.toFixed(1).replace('-', '−')})`).join(', '), '.'),
    f.probability && h('p', {}, 'With the uncertainty of the inputs: ', Object.entries(f.probability).filter(([, p]) => p > 0).map(([verdict, p]) => `${words[verdict]} ${share(p)}`).join(', '),
      ends(f.quantiles, times) && `; error over limit ${ends(f.quantiles, times)} (5 to 95 %)`, '.'),
    f.parts?.length > 0 && h('ul', {}, f.parts.map((p) => h('li', {}, `${words[p.verdict] ?? p.verdict}: ${p.because}`))),
    f.published?.length > 0 && h('ul', {}, f.published.map((p) => h('li', {}, `${p.standard}, ${p.clause} (${p.edition}): ${p.verdict ?? 'no verdict'}${typeof p.utilisation === 'number' ? `, ${times(p.utilisation)} of its limit` : ''}`))),
    f.source && h('p', { class: 'quiet' }, `φ = ${f.factor ?? '–'}, ${f.basis ?? ''}. Source: ${f.source}.`));
}
