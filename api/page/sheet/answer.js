// The answer, as the service gives it: the class, the ladder, the numbers.

import { h, put, picture } from './dom.js';
import { shown, ends, quantityShown, share } from './quantity.js';
import { margins } from './margins.js';
import { plain } from './schema.js';

// Answer shows answers in an element. Parts that hold state of their own, such
// as the sliders, are given to it as elements and stay.
export class Answer {
  constructor(root, sheet, parts) {
    this.root = root;
    this.sheet = sheet;
    this.parts = parts; // {whatif, map, copies}: elements
    this.onAdd = () => {}; // asked for an input by its pointer
  }

  empty(...children) {
    put(this.root, children);
  }

  show(a) {
    const folds = [...this.root.querySelectorAll('details[id]')].map((d) => [d.id, d.open]);
    const places = [
      ['ladder', 'Ladder', this.ladder(a)],
      ['margins', 'Margins', margins(a, this)],
      ['whatif', 'What if', this.parts.whatif],
      ['map', 'Map', this.parts.map],
      ['numbers', 'Numbers', this.numbers(a)],
      ['copies', 'Take it away', this.parts.copies],
    ];
    const contents = h('nav', { class: 'contents', 'aria-label': 'Parts of the answer' },
      places.map(([id, title]) => h('a', { href: '#part-' + id }, title)));
    put(this.root, this.recommendation(a), contents, places.map(([id, title, body]) =>
      h('section', { class: 'part', id: 'part-' + id, 'aria-labelledby': 'part-title-' + id, tabindex: '-1' }, h('h3', { id: 'part-title-' + id }, title), body)));
    for (const [id, open] of folds) {
      const again = document.getElementById(id);
      if (again) again.open = open;
    }
  }

  recommendation(a) {
    const r = a.recommendation;
    return h('div', { class: 'card', id: 'recommended' },
      h('p', { class: 'over' }, r.provisional ? 'Recommended for now: inputs are missing' : 'Recommended, the cheapest class that holds'),
      h('p', { class: 'class', id: 'class' }, r.title, ' ', h('code', {}, r.class)),
      h('p', {}, `Solves ${r.solves}.`),
      r.beside && h('p', {}, `Beside it, for the natural frequencies: ${r.beside.title.toLowerCase()} (${r.beside.class}).`),
      this.probabilities(r, a.uncertainty),
      r.conditions.length > 0 && h('div', { class: 'conditions' }, h('h3', {}, r.conditions.length === 1 ? 'On one condition' : 'On conditions'), h('ul', {}, r.conditions.map((c) => h('li', {}, c)))),
      this.settled(r.if_settled),
      h('details', { class: 'fold', id: 'axes' }, h('summary', {}, 'What the model has, axis by axis'),
        h('dl', { class: 'axes' }, Object.entries(r.axes).map(([axis, value]) => h('div', {}, h('dt', {}, plain(axis)), h('dd', {}, value))))),
      h('details', { class: 'fold', id: 'why' }, h('summary', {}, 'Why it holds'), h('ul', {}, r.justification.map((j) => h('li', {}, j)))),
      this.warnings(a));
  }

  probabilities(r, u) {
    if (!r.probability) return undefined;
    const rows = Object.entries(r.probability).filter(([, p]) => p > 0).sort((x, y) => y[1] - x[1]);
    const error = Math.max(...Object.values(r.standard_error));
    return h('div', { class: 'chances' }, h('h3', {}, 'With the uncertainty of the inputs'),
      h('ul', {}, rows.map(([id, p]) => h('li', {}, h('span', { class: 'chance-name' }, this.title(id)), h('meter', { min: 0, max: 1, value: p, 'aria-label': `Probability of ${this.title(id)}` }, share(p)), h('span', { class: 'number' }, share(p))))),
      u && h('p', { class: 'quiet' }, `From ${u.samples} draws of ${u.inputs.map((x) => x.input).join(', ')}; standard error ${shown(100 * error, 2)} % at most.`,
        u.outside > 0 && ` ${u.outside} more lay beyond what an input or a property may be, and were left out.`));
  }

  settled(list) {
    if (list.length === 0) return undefined;
    return h('div', { class: 'conditions' }, h('h3', {}, 'What would settle it'), h('ul', {}, list.map((s) =>
      h('li', {}, this.inputs(s.needs), ` ${s.needs.length === 1 ? 'is' : 'are'} not given; the class could become ${this.title(s.would_become)}.`))));
  }

  // inputs names missing inputs, each as a button that shows its field.
  inputs(paths) {
    return paths.map((path, i) => [i > 0 && (i === paths.length - 1 ? ' and ' : ', '),
      h('button', { type: 'button', class: 'link', onclick: () => this.onAdd('/' + path.replaceAll('.', '/')) }, path)]);
  }

  warnings(a) {
    const list = [...new Map(a.warnings.map((w) => [w.pointer + w.sentence, w])).values()];
    return [
      list.length > 0 && h('details', { class: 'fold', id: 'warnings' }, h('summary', {}, list.length === 1 ? '1 warning' : `${list.length} warnings`),
        h('ul', { class: 'told' }, list.map((w) => h('li', {}, w.sentence, ' ', w.pointer && h('button', { type: 'button', class: 'link', onclick: () => this.onAdd(w.pointer) }, 'to the input', h('span', { class: 'unseen' }, ' ' + w.pointer)))))),
      a.cautions.length > 0 && h('details', { class: 'fold', id: 'cautions', open: true }, h('summary', {}, 'Cautions'), h('ul', {}, a.cautions.map((c) => h('li', {}, c)))),
    ];
  }

  title(id) {
    return this.sheet.classes.find((c) => c.id === id)?.title ?? id;
  }

  // ladder draws the classes that fell, from the cheapest on, and the one that
  // stands.
  ladder(a) {
    const r = a.recommendation;
    const rung = (state, word, title, id, body) => h('li', { class: 'rung-' + state }, picture('rung-' + state, 'rung-picture'),
      h('div', {}, h('p', { class: 'rung-name' }, title, ' ', id && h('code', {}, id), h('span', { class: 'tag' }, word)), body));
    const fell = r.rejected.map((x) => rung('broken', 'falls', x.title, x.class, [
      h('p', { class: 'small' }, 'by ', x.because.map((id, i) => [i > 0 && ', ', h('a', { href: '#finding-' + id }, a.findings[id]?.title.toLowerCase() ?? id)])),
      h('details', { class: 'small' }, h('summary', {}, 'Why', h('span', { class: 'unseen' }, ` ${x.title} falls`)), h('p', {}, x.sentence)),
    ]));
    const dearer = this.sheet.classes.some((c) => c.rank > r.rank);
    return h('div', {}, h('p', { class: 'quiet' }, 'From the cheapest class on; the first rung that holds is the answer.'),
      h('ol', { class: 'ladder' }, fell, rung('stands', 'holds: recommended', r.title, r.class),
        dearer && rung('spare', 'not needed', 'Dearer classes')));
  }

  numbers(a) {
    return [this.frequencies(a), this.groups(a), this.setup(a), this.scales(a), this.origin(a)];
  }

  frequencies(a) {
    if (!a.frequencies.length) return undefined;
    return table('Frequencies', ['Frequency', '>Value', '>Over the wet one'],
      a.frequencies.map((f) => [f.title, quantityShown(f.value, f.unit, 4), f.ratio_to_wet === null ? '' : shown(f.ratio_to_wet, 3)]));
  }

  groups(a) {
    const all = Object.values(a.groups);
    const known = all.filter((g) => g.value !== null);
    const uncertain = known.some((g) => ends(g.quantiles) !== '');
    const row = (g) => [symbol(g.symbol), h('span', {}, g.title, g.band && h('span', { class: 'tag' }, g.band)), shown(g.value, 4),
      ...(uncertain ? [ends(g.quantiles)] : []),
      h('span', {}, g.definition, h('span', { class: 'with' }, Object.entries(g.with ?? {}).map(([k, v]) => `${k} = ${v}`).join(', ')))];
    const absent = all.filter((g) => g.value === null);
    return [
      table('Dimensionless groups', ['', 'Group', '>Value', ...(uncertain ? ['5 to 95 %'] : []), 'Definition'], known.map(row)),
      absent.length > 0 && h('details', { class: 'fold', id: 'absent' }, h('summary', {}, `${absent.length} groups without a value`),
        h('ul', {}, absent.map((g) => h('li', {}, h('b', {}, g.title), ' ', g.because)))),
    ];
  }

  setup(a) {
    return table('Set-up figures', ['Figure', '>Value', 'Rule'], Object.values(a.setup).map((x) =>
      [h('span', {}, x.title, x.governs && h('span', { class: 'tag' }, 'governs')), quantityShown(x.value, x.unit, 2), h('span', {}, x.rule, h('span', { class: 'with' }, x.source))]));
  }

  scales(a) {
    return h('details', { class: 'fold', id: 'scales' }, h('summary', {}, 'Scales: what the groups are made of'),
      table('Scales', ['', 'Scale', '>Value', 'Where from'], Object.values(a.scales).map((x) =>
        [symbol(x.symbol), x.title, x.unit === '1' ? shown(x.value, 4) : quantityShown(x.value, x.unit, 4), x.origin + (x.note ? ': ' + x.note : '')])));
  }

  origin(a) {
    return h('p', { class: 'quiet small' }, `Tolerance ${a.study.tolerance.name ?? ''}: frequency ${shown(a.study.tolerance.frequency * 100)} %, load ${shown(a.study.tolerance.load * 100)} %, response ${shown(a.study.tolerance.response * 100)} %. `,
      `Of interest: ${a.study.interest.join(', ')}. `, 'Engine ', a.engine.version, ', case ', h('code', {}, a.digest.slice(0, 12)), '.');
  }
}

// symbol writes m_a with its index set low.
const symbol = (text) => h('i', {}, text.split(/(_[^\s/]+)/).map((part) => (part.startsWith('_') ? h('sub', {}, part.slice(1)) : part)));

// table makes a table; a head that begins with > is one of numbers.
export function table(caption, heads, rows) {
  const isNumber = heads.map((x) => x.startsWith('>'));
  const head = (text, i) => (text === '' ? h('td', {}) : h('th', { scope: 'col', class: isNumber[i] && 'number' }, isNumber[i] ? text.slice(1) : text));
  const cells = (row) => row.map((cell, i) => (i === heads.findIndex((x) => x !== '') ? h('th', { scope: 'row' }, cell) : h('td', { class: isNumber[i] && 'number' }, cell)));
  return h('div', { class: 'scroll', role: 'region', 'aria-label': caption, tabindex: '0' },
    h('table', {}, h('caption', {}, caption), h('thead', {}, h('tr', {}, heads.map(head))), h('tbody', {}, rows.map((row) => h('tr', {}, cells(row))))));
}
