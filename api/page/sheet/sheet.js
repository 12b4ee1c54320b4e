// The case sheet: a case on the left, its answer on the right. The case is plain
// data; everything shown is made from it and from what the service says.

import { h, put, at, picture, later, go, focusIn } from './dom.js';
import { copy, ordered, fromText, toLink, fromLink } from './case.js';
import { load } from './schema.js';
import { classify } from './service.js';
import { Form } from './form.js';
import { Adder } from './adder.js';
import { Answer } from './answer.js';
import { WhatIf } from './whatif.js';
import { RegimeMap } from './map.js';
import { Copies } from './copies.js';

const pause = 250; // ms after the last change before the service is asked

const state = { kase: {}, aside: new Map(), former: undefined, answered: undefined, told: undefined, violations: [] };
let sheet, form, answer, whatif, map, copies, running;

start();

async function start() {
  theme();
  try {
    sheet = await load();
  } catch (error) {
    put(at('answer-body'), h('p', { class: 'note bad' }, picture('mark-invalid', 'mark'), 'The catalogue can’t be read: ' + error.message));
    return;
  }
  form = new Form(at('fields'), sheet, changed);
  new Adder(at('adder'), form);
  form.onTouched = () => report(state.violations, state.answered?.answer.warnings ?? []);
  whatif = new WhatIf(sheet, askClass, useValue);
  copies = new Copies(() => ({ kase: ordered(state.answered.kase, sheet), answer: state.answered.answer }), say);
  map = new RegimeMap(say);
  answer = new Answer(at('answer-body'), sheet, { whatif: whatif.element, map: map.element, copies: copies.element });
  answer.onAdd = (pointer) => form.reveal(pointer, true) ?? go(at('case'));
  kindPicker();
  examplePicker();
  reading();
  links();
  at('clear').addEventListener('click', () => replace({}, 'The sheet is empty.'));
  at('undo').addEventListener('click', () => replace(state.former, 'The former case is back.'));
  fromAddress();
  document.documentElement.dataset.ready = 'yes';
}

// theme lets the colours be picked; a browser that keeps nothing follows the
// system.
function theme() {
  const store = { get: () => localStorage.getItem('colours') ?? '', set: (v) => localStorage.setItem('colours', v) };
  const quietly = (f) => { try { return f(); } catch { return ''; } };
  const apply = (name) => { document.documentElement.dataset.theme = name; };
  at('theme').value = quietly(store.get);
  apply(at('theme').value);
  at('theme').addEventListener('change', (event) => {
    apply(event.target.value);
    quietly(() => store.set(event.target.value));
  });
}

function kindPicker() {
  put(at('kind-list'), sheet.kinds.map((k) => h('label', { class: 'kind', title: k.doc },
    h('input', { type: 'radio', name: 'kind', value: k.name, onchange: () => pickKind(k.name) }),
    picture(at('kind-' + k.name) ? 'kind-' + k.name : 'kind-generic', 'pictogram'), h('span', {}, k.title))));
  const pointer = (event) => { if (event.target.closest('label')) setTimeout(() => { at('kinds').open = false; }); };
  at('kind-list').addEventListener('pointerup', pointer);
  at('kind-list').addEventListener('keydown', (event) => {
    if (event.key !== 'Enter' || event.target.name !== 'kind') return;
    if (!event.target.checked) event.target.click();
    at('kinds').open = false;
    go(form.sections[0]?.rows.querySelector('input, select') ?? at('fields'));
  });
}

function showKind() {
  const k = sheet.kind(state.kase.structure?.kind);
  for (const radio of at('kind-list').querySelectorAll('input')) radio.checked = radio.value === k?.name;
  put(at('kind-now'), k ? [picture(at('kind-' + k.name) ? 'kind-' + k.name : 'kind-generic', 'pictogram'), h('span', {}, h('b', {}, k.title), h('span', { class: 'quiet' }, ' ' + k.doc), h('span', { class: 'change' }, 'change'))] : 'Pick a kind of structure');
  at('adder').hidden = !k;
}

// pickKind keeps what the new kind has too, and puts the rest aside until a kind
// that has it is picked.
function pickKind(name) {
  const was = state.kase.structure ?? {};
  const names = new Set(sheet.fieldsOf('structure', name).map((f) => f.name));
  const structure = { kind: name };
  for (const [key, value] of [...state.aside, ...Object.entries(was)]) {
    if (key === 'kind') continue;
    if (names.has(key)) structure[key] = value;
    else state.aside.set(key, value);
  }
  for (const key of Object.keys(structure)) state.aside.delete(key);
  state.kase.structure = structure;
  const kept = [...state.aside.keys()];
  message(kept.length ? `Put aside, for ${sheet.kind(name).title.toLowerCase()} has no such input: ${kept.join(', ')}.` : '');
  showKind();
  form.open(state.kase);
  changed();
}

function examplePicker() {
  const select = at('example');
  for (const k of sheet.kinds) {
    const of = sheet.examples.filter((e) => e.case.structure.kind === k.name);
    if (of.length) select.append(h('optgroup', { label: k.title }, of.map((e) => h('option', { value: e.name }, e.case.title ?? e.name))));
  }
  select.addEventListener('change', () => {
    const picked = sheet.examples.find((e) => e.name === select.value);
    if (picked) replace(copy(picked.case), '');
    select.value = '';
  });
}

// reading takes a case from a paste, a file or a drop.
function reading() {
  const read = (text) => {
    try {
      replace(fromText(text), 'The case was read.');
      at('read').open = false;
      at('paste').value = '';
    } catch (error) {
      message(error.message, true);
    }
  };
  const readFile = async (file) => file && read(await file.text());
  at('paste-read').addEventListener('click', () => read(at('paste').value));
  at('file').addEventListener('change', async (event) => {
    await readFile(event.target.files[0]);
    event.target.value = '';
  });
  document.addEventListener('dragover', (event) => event.preventDefault());
  document.addEventListener('drop', (event) => {
    const { files } = event.dataTransfer;
    const text = event.dataTransfer.getData('text');
    if (!files.length && event.target.matches('input, textarea')) return;
    event.preventDefault();
    if (files.length) readFile(files[0]);
    else if (text) read(text);
  });
  document.addEventListener('paste', (event) => {
    const text = event.clipboardData.getData('text');
    if (event.target.matches('input, textarea') || !text.trim().startsWith('{')) return;
    event.preventDefault();
    read(text);
  });
}

// links moves within the page without a new fragment: that holds the case.
function links() {
  document.addEventListener('click', (event) => {
    const href = event.target.closest('a')?.getAttribute('href');
    const target = href?.startsWith('#') && at(href.slice(1));
    if (!target) return;
    event.preventDefault();
    go(target);
  });
  addEventListener('hashchange', () => fromAddress());
}

// fromAddress opens the case that the address holds, or the kind that it names.
function fromAddress() {
  const fragment = new URLSearchParams(location.hash.slice(1));
  const kind = fragment.get('kind') ?? new URLSearchParams(location.search).get('kind');
  if (fragment.has('case')) {
    try {
      const kase = fromLink(fragment.get('case'));
      if (JSON.stringify(kase) !== JSON.stringify(ordered(state.kase, sheet))) open(kase);
      return;
    } catch {
      open({});
      message('The address holds no case that can be read; perhaps it was cut short.', true);
      return;
    }
  }
  open(sheet.kind(kind) ? { structure: { kind } } : {});
}

// replace opens another case, and keeps the present one for Undo.
function replace(kase, text) {
  const former = copy(state.kase);
  open(copy(kase));
  state.former = former;
  at('undo').hidden = Object.keys(former).length === 0;
  message(text);
}

function open(kase) {
  state.kase = sheet.normal(kase);
  if (state.kase.structure !== undefined && (typeof state.kase.structure !== 'object' || state.kase.structure === null)) delete state.kase.structure;
  state.aside.clear();
  state.former = undefined;
  state.answered = undefined;
  at('undo').hidden = true;
  message('');
  showKind();
  at('kinds').open = !sheet.kind(state.kase.structure?.kind);
  form.open(state.kase);
  changed.now();
}

function message(text, isBad, ...more) {
  at('message').hidden = text === '';
  at('message').className = isBad ? 'message bad' : 'message';
  put(at('message'), text, more);
  if (text) say(text);
}

// say tells those who listen to the page, once for each new text.
function say(text) {
  if (at('say').textContent !== text) at('say').textContent = text;
}

const asked = later(ask, pause);

function changed() {
  asked();
}
changed.now = () => asked.now();

// ask asks twice: for the answer alone, which is there at once, and then for what
// would change it. A change of the case gives both up.
async function ask() {
  keepAddress();
  running?.abort();
  whatif.stop();
  if (!state.kase.structure?.kind) return nothingYet();
  running = new AbortController();
  const { signal } = running;
  const kase = copy(state.kase);
  at('answer-body').setAttribute('aria-busy', 'true');
  const first = await classify(kase, signal, { what_if: false });
  if (signal.aborted || first === undefined) return;
  at('answer-body').removeAttribute('aria-busy');
  take(kase, first);
  if (!first.answer) return;
  const whole = await classify(kase, signal);
  if (signal.aborted || whole === undefined) return;
  explored(kase, first.answer, whole);
}

function keepAddress() {
  const kase = ordered(state.kase, sheet);
  const hash = Object.keys(kase).length ? '#case=' + toLink(kase) : '';
  history.replaceState(null, '', location.pathname + location.search + hash);
  document.title = (kase.title ? kase.title + ' · ' : '') + 'Case sheet · regimed';
}

function nothingYet() {
  at('answer-body').removeAttribute('aria-busy');
  state.answered = undefined;
  report([], []);
  strip('');
  fresh();
  answer.empty(h('div', { class: 'card' }, h('p', { class: 'over' }, 'Nothing to answer yet'),
    h('p', {}, 'Pick the kind of structure, or a demo case. The answer appears here as you type: the cheapest class of model whose every assumption holds, why each cheaper one falls, and what would change that.'),
    h('p', {}, 'Quantities take any unit, such as ', h('code', {}, '300 mm'), ', ', h('code', {}, '12 ksi'), ' or ', h('code', {}, '1.1 kn'),
      ', and an uncertainty: ', h('code', {}, '2.1 +- 0.2 m/s'), ' or ', h('code', {}, '1.8 .. 2.4 m/s'), '. What is not given is named where it matters.')));
  document.documentElement.dataset.state = 'empty';
}

function take(kase, result) {
  if (result.failure) return failed(result);
  if (document.documentElement.dataset.state === 'failed') message('');
  if (result.violations) return refused(result.violations);
  report([], result.answer.warnings);
  fresh();
  show(kase, result.answer, () => whatif.wait(kase, result.answer));
  const r = result.answer.recommendation;
  strip(r.title);
  say(`Recommended: ${r.title}${r.provisional ? ', provisional' : ''}.`);
  document.documentElement.dataset.state = 'answered';
  return undefined;
}

// explored shows what would change the answer. Where that can't be had, the
// answer stands without it.
function explored(kase, a, whole) {
  const lacks = whole.late ? 'The values at which the class turns were not found in time; the sliders have no marks.' : whole.failure;
  show(kase, whole.answer ?? a, () => whatif.show(kase, whole.answer ?? a, lacks));
}

function show(kase, a, vary) {
  state.answered = { kase, answer: a };
  const focus = focusIn(at('answer'));
  vary();
  map.offer(kase, whatif.offered);
  answer.show(a);
  focus();
}

function failed({ failure, late }) {
  stale(failure);
  message(failure, !late, ' ', h('button', { type: 'button', id: 'again', onclick: () => changed.now() }, 'Ask again'));
  document.documentElement.dataset.state = 'failed';
}

function refused(violations) {
  report(violations, []);
  const n = state.told.wrong.length + state.told.nowhere.length;
  const what = n ? count(n, 'input needs', 'inputs need') + ' attention' : 'The case needs more inputs; the fields say which';
  stale(what);
  strip(what);
  say(what + '.');
  document.documentElement.dataset.state = 'refused';
}

function fresh() {
  at('answer').classList.remove('stale');
  at('stale').hidden = true;
}

// stale says that the answer belongs to the case as it was, or that there is none.
function stale(text) {
  if (state.answered) {
    at('answer').classList.add('stale');
    at('stale').hidden = false;
    put(at('stale'), picture('mark-undetermined', 'mark'), h('span', {}, `${text.replace(/\.$/, '')}. Below is the answer to the case as it was before.`));
    return;
  }
  fresh();
  answer.empty(h('div', { class: 'card' }, h('p', { class: 'over' }, 'No answer yet'), h('p', {}, text.replace(/\.$/, '') + '.')));
}

// report puts violations and warnings at their fields, and a summary with links
// above them.
function report(violations, warnings) {
  state.violations = violations;
  state.told = form.show(violations, warnings);
  const { needed, wrong, nowhere } = state.told;
  const link = (v) => h('a', { href: '#' + v.row.element.id }, v.row.field.label);
  const list = (title, kind, items) => items.length > 0 && h('div', { class: kind }, h('p', {}, picture(kind === 'need' ? 'mark-undetermined' : 'mark-invalid', 'mark'), ' ', h('b', {}, title)), h('ul', {}, items));
  put(at('trouble'),
    list(count(wrong.length + nowhere.length, 'input needs', 'inputs need') + ' attention', 'bad', [...wrong.map((v) => h('li', {}, link(v), ': ', v.detail)), ...nowhere.map((v) => h('li', {}, h('code', {}, v.pointer || 'case'), ': ', v.detail))]),
    list('Still needed', 'need', needed.map((v) => h('li', {}, link(v), ': ', v.detail))));
  at('trouble').hidden = !at('trouble').hasChildNodes();
}

const count = (n, one, many) => `${n} ${n === 1 ? one : many}`;

function strip(text) {
  at('strip').hidden = text === '';
  at('strip').textContent = text;
}

async function askClass(kase, signal) {
  const result = await classify(kase, signal, { fields: 'recommendation' });
  if (result?.answer) return result.answer.recommendation;
  return { failure: result?.failure ?? 'No case: ' + (result?.violations[0].detail ?? '') };
}

// useValue takes a value of a slider into the case.
function useValue(pointer, text) {
  form.give(pointer, text);
  form.refresh(pointer);
  say(`${pointer.slice(1).replaceAll('/', '.')} is now ${text}.`);
  at('if' + pointer.replaceAll('/', '-'))?.focus();
}
