// The inputs of the sheet: one row a field, made when it is shown and never
// made anew while someone types in it.

import { h, put, picture, go } from './dom.js';
import { get, set, remove, joined } from './case.js';
import { textOf, isNumber, toNumber, unitShown } from './quantity.js';

const manyOptions = 30; // from here on a list is for typing into, not for scrolling through

const wide = new Set(['text', 'choices', 'interval', 'rows']);

const idOf = (pointer) => 'f' + pointer.replaceAll('/', '-');

// Form shows a case, changes it as someone types, and calls changed after that.
export class Form {
  constructor(root, sheet, changed) {
    this.root = root;
    this.sheet = sheet;
    this.changed = changed;
    this.rows = new Map();
    this.sections = [];
    this.touched = new Set();
  }

  // open builds the sheet for a case: the usual inputs of its kind, and all that
  // it gives.
  open(kase) {
    this.kase = kase;
    this.rows.clear();
    this.touched.clear();
    const kind = kase.structure?.kind;
    this.sections = [];
    if (!kind && Object.keys(kase).length === 0) return put(this.root);
    this.usual = this.sheet.usual(kind);
    const labels = { name: 'labels', title: 'Name', doc: '', fields: this.sheet.labels() };
    this.sections = [...this.sheet.sections(kind), labels].map((s) => this.section(s));
    put(this.root, this.sections.map((s) => s.element), this.strangers());
    for (const s of this.sections) {
      for (const f of s.fields) if (this.usual.has(f.pointer) || get(kase, f.pointer) !== undefined) this.addRow(s, f);
      this.count(s);
    }
    return this.root;
  }

  section(s) {
    const id = 'section-' + s.name;
    const title = h('h3', { id }, s.title);
    const list = h('ul');
    const summary = h('summary');
    const more = h('details', { class: 'more' }, summary, s.doc && h('p', { class: 'quiet' }, s.doc), list);
    const rows = h('div', { class: 'rows' });
    const element = h('section', { class: 'group', 'aria-labelledby': id }, title, rows, more);
    return { ...s, element, rows, more, list, summary };
  }

  // count brings the list of inputs that are not shown up to date.
  count(s) {
    const rest = s.fields.filter((f) => !this.rows.has(f.pointer));
    s.element.classList.toggle('bare', rest.length === s.fields.length);
    s.more.hidden = rest.length === 0;
    put(s.summary, rest.length === s.fields.length ? `${rest.length} inputs` : `${rest.length} more`, h('span', { class: 'unseen' }, ` of ${s.title}`));
    put(s.list, rest.map((f) => h('li', {}, h('button', { type: 'button', class: 'add', onclick: () => this.reveal(f.pointer, true) },
      h('b', {}, f.label), ' ', h('span', {}, firstSentence(f.help))))));
  }

  // hidden lists the fields that are not shown, with their sections.
  hidden() {
    return this.sections.flatMap((s) => s.fields.filter((f) => !this.rows.has(f.pointer)).map((field) => ({ field, section: s.title })));
  }

  // reveal shows the field at a place, or the one that the place lies in, and
  // returns its row.
  reveal(pointer, focus) {
    let row = this.rowAt(pointer);
    if (!row) {
      const section = this.sections.find((s) => s.fields.some((f) => covers(f.pointer, pointer)));
      if (!section) return undefined;
      row = this.addRow(section, section.fields.find((f) => covers(f.pointer, pointer)));
      this.count(section);
      this.onReveal?.();
    }
    if (focus) go(row.element);
    return row;
  }

  rowAt(pointer) {
    for (const row of this.rows.values()) if (covers(row.field.pointer, pointer)) return row;
    return undefined;
  }

  addRow(section, field) {
    const row = this.row(field, section);
    const place = section.fields.indexOf(field);
    const next = section.fields.slice(place + 1).map((f) => this.rows.get(f.pointer)).find((r) => r);
    section.rows.insertBefore(row.element, next?.element ?? null);
    this.rows.set(field.pointer, row);
    return row;
  }

  row(field, section) {
    const id = idOf(field.pointer);
    const row = { field, section, id, controls: [], note: h('div', { class: 'notes', id: id + '-note' }) };
    const help = h('p', { class: 'help', id: id + '-help' }, field.help);
    const drop = !this.usual.has(field.pointer) && h('button', { type: 'button', class: 'drop', onclick: () => this.dropRow(row) },
      h('span', { 'aria-hidden': 'true' }, '×'), h('span', { class: 'unseen' }, `Remove ${field.label}`));
    const make = controls[field.type] ?? controls.text;
    row.element = h('div', { class: wide.has(field.type) ? 'field wide' : 'field', id: id + '-row', 'data-pointer': field.pointer });
    make(this, row, (label, body) => put(row.element, h('div', { class: 'head' }, label, h('span', { class: 'unit' }, measureText(field))), body, drop, help, row.note));
    return row;
  }

  dropRow(row) {
    remove(this.kase, row.field.pointer);
    row.element.remove();
    this.rows.delete(row.field.pointer);
    this.count(row.section);
    this.onReveal?.();
    go(row.section.more);
    this.changed();
  }

  // control ties an element to a place in the case.
  control(row, element, pointer) {
    element.setAttribute('aria-describedby', `${row.id}-note ${row.id}-help`);
    row.controls.push({ element, pointer });
    element.addEventListener('blur', () => {
      if (this.touched.has(pointer)) return;
      this.touched.add(pointer);
      this.onTouched?.();
    });
    return element;
  }

  // give takes a value into the case; undefined takes it out.
  give(pointer, value) {
    if (value === undefined) remove(this.kase, pointer);
    else set(this.kase, pointer, value);
    this.changed();
  }

  // refresh shows what the case holds at a place that something else changed.
  refresh(pointer) {
    const row = this.reveal(pointer);
    if (!row) return;
    const fresh = this.row(row.field, row.section);
    row.element.replaceWith(fresh.element);
    this.rows.set(row.field.pointer, fresh);
  }

  // strangers lists what a case gives and no field is called, so that it can be
  // seen and taken out.
  strangers() {
    const known = new Set(['structure', ...this.sheet.root.map((f) => f.name), ...this.sheet.blocks.map((b) => b.name)]);
    const list = Object.keys(this.kase).filter((name) => !known.has(name)).map((name) => joined('', name));
    for (const block of ['structure', ...this.sheet.blocks.map((b) => b.name)]) list.push(...this.strangersIn(block));
    if (list.length === 0) return undefined;
    return h('section', { class: 'group', 'aria-labelledby': 'strangers' }, h('h3', { id: 'strangers' }, 'Not known'),
      h('div', { class: 'rows' }, list.map((pointer) => this.stranger(pointer))));
  }

  strangersIn(block) {
    const value = this.kase[block];
    if (value === undefined || (block === 'structure' && !this.sheet.kind(value?.kind))) return [];
    if (typeof value !== 'object' || value === null || Array.isArray(value)) return ['/' + block];
    const names = new Set(['kind', ...this.sheet.fieldsOf(block, this.kase.structure?.kind).map((f) => f.name)]);
    return Object.keys(value).filter((name) => !names.has(name)).map((name) => joined('/' + block, name));
  }

  stranger(pointer) {
    const note = h('div', { class: 'notes' });
    const element = h('div', { class: 'field', id: idOf(pointer) + '-row', 'data-pointer': pointer, tabindex: '-1' },
      h('p', { class: 'head' }, h('code', {}, `${pointer.slice(1).replaceAll('/', '.')}: ${JSON.stringify(get(this.kase, pointer))}`),
        h('button', { type: 'button', onclick: () => this.takeOut(pointer, element) }, 'Take it out')), note);
    this.rows.set(pointer, { field: { pointer, label: pointer.slice(1) }, section: undefined, id: idOf(pointer), controls: [], note, element });
    return element;
  }

  takeOut(pointer, element) {
    remove(this.kase, pointer);
    this.rows.delete(pointer);
    element.remove();
    this.changed();
  }

  // show puts violations and warnings at their fields. What is missing and was
  // not looked at yet is said calmly. It returns what is needed, what is wrong,
  // and what has no field here.
  show(violations, warnings) {
    const told = { needed: [], wrong: [], nowhere: [] };
    const notes = new Map();
    const note = (row, kind, text) => notes.set(row, [...(notes.get(row) ?? []), [kind, text]]);
    const marked = new Set();
    for (const v of violations) {
      const row = this.reveal(v.pointer);
      const calm = v.code === 'missing' && !this.touched.has(v.pointer);
      if (!row) told.nowhere.push(v);
      else {
        (calm ? told.needed : told.wrong).push({ ...v, row });
        note(row, calm ? 'need' : 'bad', v.detail);
        if (!calm) this.controlsAt(row, v.pointer).forEach((c) => marked.add(c));
      }
    }
    for (const w of warnings) {
      const row = this.rowAt(w.pointer);
      if (row) note(row, 'warn', w.sentence);
    }
    for (const row of this.rows.values()) this.mark(row, notes.get(row) ?? [], marked);
    return told;
  }

  controlsAt(row, pointer) {
    const own = row.controls.filter((c) => c.pointer === pointer);
    return (own.length ? own : row.controls).map((c) => c.element);
  }

  mark(row, notes, marked) {
    for (const c of row.controls) {
      if (marked.has(c.element)) c.element.setAttribute('aria-invalid', 'true');
      else c.element.removeAttribute('aria-invalid');
    }
    row.element.classList.toggle('wrong', notes.some(([kind]) => kind === 'bad'));
    const text = JSON.stringify(notes);
    if (row.told === text) return;
    row.told = text;
    put(row.note, notes.map(([kind, sentence]) => h('p', { class: 'note ' + kind }, picture(marks[kind], 'mark'), h('span', {}, h('span', { class: 'unseen' }, words[kind]), sentence))));
  }
}

const marks = { bad: 'mark-invalid', warn: 'mark-marginal', need: 'mark-undetermined' };
const words = { bad: 'Not right: ', warn: 'Warning: ', need: 'Still needed: ' };

const covers = (field, pointer) => pointer === field || pointer.startsWith(field + '/');

const firstSentence = (help) => help.split(/ (?:Must be|Default:)/)[0];

// measureText says what a field holds and in which unit the service counts.
function measureText(f) {
  if (f.type !== 'quantity' && f.type !== 'interval') return '';
  if (f.isNumber) return 'number';
  return f.unit ? [h('span', { class: 'unseen' }, `${f.measure}, in SI `), unitShown(f.unit)] : f.measure;
}

function hint(f, i = 0) {
  if (f.preset !== undefined) return `${f.preset} (default)`;
  if (f.isNumber) return 'number, or %';
  if (f.type === 'text' || f.example === undefined) return undefined;
  return `e.g. ${textOf(Array.isArray(f.example) ? f.example[i] : f.example)}`;
}

// valueOf reads what was typed into a field. What the page can't read goes to
// the service as it is, which says what is wrong with it.
export function valueOf(f, text) {
  const trimmed = text.trim();
  if (trimmed === '') return undefined;
  if (f.type === 'text') return text;
  if (/^[[{]/.test(trimmed)) {
    try {
      return JSON.parse(trimmed);
    } catch {
      return trimmed;
    }
  }
  if ((f.isNumber || f.type === 'integer' || f.type === 'number') && isNumber(trimmed)) return toNumber(trimmed);
  return trimmed;
}

// controls make the inputs of a field by its type.
const controls = {
  text(form, row, place) {
    place(label(row), entry(form, row, row.field, row.field.pointer, row.id));
  },
  choice(form, row, place) {
    const f = row.field;
    if (f.options.length > manyOptions) return long(form, row, place);
    const names = f.options.map((o) => [o, o]);
    return place(label(row), select(form, row, names, (v) => v));
  },
  boolean(form, row, place) {
    place(label(row), select(form, row, [['true', 'yes'], ['false', 'no']], (v) => (v === 'true' ? true : v === 'false' ? false : v)));
  },
  choices(form, row, place) {
    const f = row.field;
    const boxes = f.options.map((o) => form.control(row, h('input', { type: 'checkbox', value: o, onchange: take }), f.pointer));
    const now = get(form.kase, f.pointer);
    for (const b of boxes) b.checked = Array.isArray(now) && now.includes(b.value);
    function take() {
      const picked = boxes.filter((b) => b.checked).map((b) => b.value);
      form.give(f.pointer, picked.length ? picked : undefined);
    }
    place(legend(row), set_(row, 'boxes', boxes.map((b, i) => h('label', {}, b, f.options[i]))));
  },
  interval(form, row, place) {
    const f = row.field;
    const ends = ['lowest', 'highest'].map((word, i) => {
      const pointer = joined(f.pointer, i);
      const input = form.control(row, h('input', { type: 'text', placeholder: hint(f, i), oninput: take, ...plainTyping }), pointer);
      input.value = textOf(get(form.kase, pointer));
      return h('label', {}, word, input);
    });
    function take() {
      const values = row.controls.map((c) => valueOf(f, c.element.value));
      form.give(f.pointer, values.every((v) => v === undefined) ? undefined : values.map((v) => v ?? ''));
    }
    place(legend(row), set_(row, 'ends', ends));
  },
  rows(form, row, place) {
    const body = set_(row, 'list', []);
    const list = () => [get(form.kase, row.field.pointer) ?? []].flat();
    const build = () => {
      row.controls.length = 0;
      put(body, list().map((_, i) => oneOf(i)), h('button', { type: 'button', onclick: () => add() }, `Add a ${row.field.title.toLowerCase()}`));
    };
    const add = () => {
      form.give(joined(row.field.pointer, list().length), {});
      build();
      row.controls.at(-row.field.row.length)?.element.focus();
    };
    const oneOf = (i) => {
      const at = joined(row.field.pointer, i);
      return h('fieldset', { class: 'item' }, h('legend', {}, `${row.field.title} ${i + 1}`),
        row.field.row.map((f) => {
          const pointer = joined(at, f.name);
          const id = idOf(pointer);
          return h('div', { class: 'cell' }, h('label', { for: id }, f.label), entry(form, row, f, pointer, id, at));
        }),
        h('button', { type: 'button', onclick: () => { remove(form.kase, at); form.changed(); build(); } }, 'Remove', h('span', { class: 'unseen' }, ` ${row.field.title} ${i + 1}`)));
    };
    build();
    place(legend(row), body);
  },
};

const plainTyping = { autocomplete: 'off', autocapitalize: 'off', spellcheck: 'false' };

// A name for a set of inputs stands beside them, as a label does.
const label = (row) => h('label', { for: row.id }, row.field.label, row.field.needed && h('span', { class: 'needed' }, ' needed'));
const legend = (row) => h('span', { class: 'label', id: row.id + '-name' }, row.field.label);
const set_ = (row, name, children) => h('div', { class: name, id: row.id, role: 'group', 'aria-labelledby': row.id + '-name' }, children);

function entry(form, row, f, pointer, id, keep) {
  const input = form.control(row, h('input', { id, type: 'text', placeholder: hint(f), ...plainTyping, oninput: take }), pointer);
  input.value = textOf(get(form.kase, pointer));
  function take() {
    const value = valueOf(f, input.value);
    if (value !== undefined || keep === undefined) return form.give(pointer, value);
    delete get(form.kase, keep)[f.name]; // an item of a list stays one while it is empty
    return form.changed();
  }
  return input;
}

function select(form, row, options, read) {
  const f = row.field;
  const now = textOf(get(form.kase, f.pointer));
  const none = f.fallback && f.fallback.length < 32 ? `not given: ${f.fallback}` : 'not given';
  const odd = now !== '' && !options.some(([value]) => value === now) ? [[now, now]] : [];
  const element = h('select', { id: row.id, onchange: () => form.give(f.pointer, element.value === '' ? undefined : read(element.value)) },
    h('option', { value: '' }, none), [...options, ...odd].map(([value, text]) => h('option', { value }, text)));
  element.value = now;
  return form.control(row, element, f.pointer);
}

function long(form, row, place) {
  const list = h('datalist', { id: row.id + '-list' }, row.field.options.map((o) => h('option', { value: o })));
  const input = entry(form, row, row.field, row.field.pointer, row.id);
  input.setAttribute('list', list.id);
  place(label(row), [input, list]);
}
