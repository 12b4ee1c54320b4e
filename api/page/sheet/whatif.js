// What if an input were another: a slider for each that can change the class,
// with marks where it does.

import { h, s, put, later } from './dom.js';
import { get, set, copy } from './case.js';
import { leading, scaled, textOf, plain, quantityShown, shown } from './quantity.js';

const atLeast = Math.log(10); // to either side, of ln factor
const step = atLeast / 230; // about one hundredth of the value, and ten times it exactly
const atMost = Math.log(1e5);
const beyond = 0.001; // past a turn, of ln factor: where the other class is the answer
const first = 5; // sliders that stand open

// WhatIf shows the sliders of an answer. It asks with ask(case, signal), which
// answers {title, class} or {failure}, and hands a value over with
// use(pointer, value).
export class WhatIf {
  constructor(sheet, ask, use) {
    this.sheet = sheet;
    this.ask = ask;
    this.use = use;
    this.element = h('div', { class: 'whatif' });
  }

  // offered are the inputs that can be moved.
  offered = [];

  // wait takes a new case while it isn't known yet where its class turns: the
  // sliders of the former one stay where they are, if it is of the same kind.
  wait(kase, answer) {
    this.stop();
    const isAlike = this.kase?.structure.kind === kase.structure.kind;
    this.kase = kase;
    this.now = answer.recommendation;
    this.element.setAttribute('aria-busy', 'true');
    if (isAlike) return;
    this.offered = [];
    put(this.element, h('p', { class: 'quiet' }, 'The values at which the class turns are being looked for…'));
  }

  // show makes the sliders of an answer; lacks says why it names no turns.
  show(kase, answer, lacks = '') {
    this.stop();
    this.element.removeAttribute('aria-busy');
    this.kase = kase;
    this.now = answer.recommendation;
    const inputs = this.inputs(answer);
    this.offered = inputs;
    const sliders = inputs.map((input) => this.slider(input));
    const turns = inputs.some((i) => i.turns.length);
    put(this.element,
      lacks && h('p', { class: 'note' }, lacks),
      h('p', { class: 'quiet' }, inputs.length === 0 ? 'There is no input to vary.' : turns ? 'Move an input; the answer beside it is that of the moved value. Marks show where the class turns.' : 'Move an input; the answer beside it is that of the moved value.'),
      sliders.slice(0, first),
      this.loose.length > 0 && h('ul', { class: 'turns' }, this.loose.map((t) => h('li', {}, h('code', {}, t.input), ` ${t.direction === 'up' ? 'above' : 'below'} ${quantityShown(t.value, t.unit)}${t.gauge ? ' gauge' : ''}: `, h('b', {}, this.title(t.class)), why(t)))),
      sliders.length > first && h('details', { class: 'fold', id: 'more-sliders' }, h('summary', {}, `${sliders.length - first} more inputs`), sliders.slice(first)));
  }

  stop() {
    this.running?.abort();
    this.running = undefined;
  }

  // inputs lists what can be moved: those at which the class turns, the nearest
  // turn first; then the other numbers of the case. Turns that no slider can show
  // are left to loose.
  inputs(answer) {
    const found = new Map();
    this.loose = [];
    const ambient = answer.scales.ambient_pressure?.value;
    for (const t of answer.turning_points ?? []) {
      const input = found.get(t.pointer) ?? this.input(t.pointer, t, ambient);
      if (input && Math.abs(Math.log(t.factor)) < atMost) found.set(t.pointer, { ...input, turns: [...input.turns, t] });
      else this.loose.push(t);
    }
    for (const f of this.fields()) {
      const input = found.has(f.pointer) ? undefined : this.input(f.pointer);
      if (input) found.set(f.pointer, input);
    }
    const nearest = (i) => Math.min(Infinity, ...i.turns.map((t) => Math.abs(Math.log(t.factor))));
    return [...found.values()].sort((a, b) => nearest(a) - nearest(b) || 0);
  }

  // fields lists the quantities that are given: what the surroundings do first,
  // since that is what varies, then the structure and the fluid.
  fields() {
    const late = ['structure', 'fluid'];
    const sections = this.sheet.sections(this.kase.structure.kind).sort((a, b) => late.indexOf(a.name) - late.indexOf(b.name));
    return sections.flatMap((section) => section.fields).filter((f) => f.type === 'quantity' && get(this.kase, f.pointer) !== undefined);
  }

  // input describes one that is given, or one that a turning point names though
  // it is not: that has the value at which it was taken. One that is zero can't
  // be multiplied. A gauge pressure is multiplied from no pressure at all.
  input(pointer, turn, ambient) {
    const given = textOf(get(this.kase, pointer));
    const name = pointer.slice(1).replaceAll('/', '.');
    const label = this.sheet.labelOf(pointer, this.kase.structure.kind);
    if (turn && !(turn.factor > 0)) return undefined;
    const shift = turn?.gauge ? ambient * leading(given) / ((turn.value + ambient) / turn.factor - ambient) : undefined;
    if (this.isWhole(pointer)) return { pointer, name, label, turns: [], isWhole: true, text: (factor) => String(Math.max(1, Math.round((leading(given) || turn.value / turn.factor) * factor))) };
    if (leading(given) > 0) return { pointer, name, label, turns: [], text: (factor, digits = 3) => (factor === 1 ? given : scaled(given, factor, digits, shift)) };
    if (given !== '' || !turn) return undefined;
    const base = turn.value / turn.factor;
    return { pointer, name, label, turns: [], assumed: true, text: (factor, digits = 3) => `${plain(base * factor, digits)} ${turn.unit === '1' ? '' : turn.unit}`.trim() };
  }

  // isWhole reports whether only whole numbers may stand at a place.
  isWhole(pointer) {
    return this.sheet.sections(this.kase.structure.kind).some((s) => s.fields.some((f) => f.pointer === pointer && f.type === 'integer'));
  }

  slider(input) {
    const id = 'if' + input.pointer.replaceAll('/', '-');
    const turns = input.turns.map((t) => ({ ...t, at: Math.log(t.factor) })).sort((a, b) => a.at - b.at);
    const low = -Math.round(Math.max(atLeast, ...turns.map((t) => -t.at * 1.1)) / step);
    const high = Math.round(Math.max(atLeast, ...turns.map((t) => t.at * 1.1)) / step);
    const range = h('input', { type: 'range', id, min: low, max: high, step: 1, value: 0, 'aria-describedby': id + '-class' });
    const value = h('output', { class: 'value', for: id });
    const outcome = h('span', { class: 'outcome', id: id + '-class' });
    const use = h('button', { type: 'button', class: 'use' }, 'Use this value');
    const back = h('button', { type: 'button', class: 'back' }, 'Back');
    const state = { input, range, value, outcome, use, back, exact: undefined };
    const ask = later(() => this.moved(state), 60);
    range.addEventListener('input', () => {
      state.exact = undefined;
      this.tell(state);
      ask();
    });
    use.addEventListener('click', () => this.use(input.pointer, given(state.input, this.textAt(state))));
    back.addEventListener('click', () => this.put(state, 0));
    this.settle(state);
    const where = (x) => (100 * (x / step - low)) / (high - low) + '%';
    return h('div', { class: 'slider' },
      h('div', { class: 'head' }, h('label', { for: id }, input.label, ' ', h('code', { class: 'quiet' }, input.name), input.assumed && h('span', { class: 'tag' }, 'assumed')), value),
      h('div', { class: 'track' }, range, marks(turns, where)),
      h('div', { class: 'ends', 'aria-hidden': 'true' }, h('span', {}, input.text(Math.exp(low * step), 2)), h('span', {}, input.text(Math.exp(high * step), 2))),
      h('p', { class: 'then' }, outcome, ' ', back, ' ', use),
      turns.length > 0 && h('ul', { class: 'turns' }, turns.map((t) => this.turn(state, t))));
  }

  turn(state, t) {
    return h('li', {}, h('button', { type: 'button', class: 'link', onclick: () => this.put(state, t.at + (t.direction === 'up' ? beyond : -beyond)) },
      `${state.input.isWhole ? 'at' : t.direction === 'up' ? 'above' : 'below'} ${state.input.text(t.factor)}`), ` ${this.title(t.class)}`, why(t));
  }

  title(id) {
    return this.sheet.classes.find((c) => c.id === id)?.title ?? id;
  }

  // textAt is the value at which a slider stands: a turn lies between its steps.
  textAt(state) {
    return state.exact === undefined ? state.input.text(Math.exp(Number(state.range.value) * step)) : state.input.text(Math.exp(state.exact), 5);
  }

  // put moves a slider to ln factor.
  put(state, position) {
    state.exact = position || undefined;
    state.range.value = Math.round(position / step);
    this.tell(state);
    if (position === 0) {
      this.settle(state);
      state.range.focus();
    } else this.moved(state);
  }

  // settle shows the slider at the value of the case.
  settle(state) {
    this.tell(state);
    this.result(state, this.now, true);
  }

  tell(state) {
    state.value.textContent = this.textAt(state);
    const still = Number(state.range.value) === 0 && state.exact === undefined;
    state.use.hidden = still;
    state.back.hidden = still;
    this.spoken(state);
  }

  spoken(state) {
    state.range.setAttribute('aria-valuetext', `${state.value.textContent}, ${state.outcome.textContent}`);
  }

  async moved(state) {
    this.stop();
    const running = new AbortController();
    this.running = running;
    const moved = copy(this.kase);
    set(moved, state.input.pointer, given(state.input, this.textAt(state)));
    const result = await this.ask(moved, running.signal);
    if (running.signal.aborted) return;
    this.result(state, result, false);
  }

  result(state, r, still) {
    state.outcome.classList.toggle('turned', !r.failure && r.class !== this.now.class);
    state.outcome.dataset.class = r.class ?? '';
    state.outcome.dataset.value = state.value.textContent;
    put(state.outcome, r.failure ?? [r.class === this.now.class ? (still ? 'now ' : 'still ') : 'then ', h('b', {}, r.title)]);
    this.spoken(state);
  }
}

// change writes by how much an input differs at a turn, in the form that is
// easiest to read.
function change(t) {
  const signed = (x, unit) => `${x < 0 ? '−' : '+'}${shown(Math.abs(x))} ${unit}`;
  if (t.unit === 'K') return signed(t.value - t.value / t.factor, 'K');
  if (Math.abs(Math.log(t.factor)) < Math.log(1.25)) return signed(100 * (t.factor - 1), '%');
  return t.factor > 1 ? `×${shown(t.factor)}` : `÷${shown(1 / t.factor)}`;
}

// given is a text of a slider as it stands in a case.
const given = (input, text) => (input.isWhole ? Number(text) : text);

// why says which finding turns the class; without one it is the domain of the
// classes that changes.
const why = (t) => h('span', { class: 'quiet' }, t.factor > 0 ? ` (${change(t)}: ` : ' (',
  t.finding ? [h('a', { href: '#finding-' + t.finding }, t.finding), ` turns ${t.verdict}`] : 'other classes come into question', ')');

// marks draws where the class turns, below the track.
const marks = (turns, where) => s('svg', { class: 'turn-marks', 'aria-hidden': 'true', height: 12 },
  s('line', { class: 'origin', x1: where(0), x2: where(0), y1: 0, y2: 12 }),
  turns.map((t) => s('svg', { x: where(t.at), overflow: 'visible' }, s('path', { d: t.at > 0 ? 'M-1 0v12l8-6z' : 'M1 0v12l-8-6z' }))));
