// The search box that adds an input: a combobox over the fields that are not
// shown.

import { h, put } from './dom.js';

const most = 12;

export class Adder {
  constructor(root, form) {
    this.form = form;
    this.list = h('ul', { id: 'adder-list', role: 'listbox', 'aria-label': 'Inputs', hidden: true });
    this.input = h('input', {
      id: 'add', type: 'text', role: 'combobox', 'aria-autocomplete': 'list', 'aria-expanded': 'false', 'aria-controls': 'adder-list',
      autocomplete: 'off', spellcheck: 'false', placeholder: 'e.g. damping, wall, waves',
      oninput: () => this.open(), onkeydown: (event) => this.key(event), onblur: () => this.close(),
    });
    put(root, h('label', { for: 'add' }, 'Add an input'), h('div', { class: 'combo' }, this.input, this.list));
    this.active = -1;
  }

  matches() {
    const words = this.input.value.toLowerCase().split(/\s+/).filter(Boolean);
    if (words.length === 0) return [];
    const rank = ({ field, section }) => {
      const name = `${field.label} ${field.name.replaceAll('_', ' ')} ${section}`.toLowerCase();
      const all = `${name} ${field.help.toLowerCase()}`;
      return words.every((w) => all.includes(w)) ? words.filter((w) => name.includes(w)).length : -1;
    };
    return this.form.hidden().map((x) => ({ ...x, rank: rank(x) })).filter((x) => x.rank >= 0).sort((a, b) => b.rank - a.rank).slice(0, most);
  }

  open() {
    this.found = this.matches();
    this.active = this.found.length ? 0 : -1;
    put(this.list, this.found.map(({ field, section }, i) => h('li', {
      id: 'adder-' + i, role: 'option', 'aria-selected': 'false', onpointerdown: (event) => { event.preventDefault(); this.pick(i); },
    }, h('b', {}, field.label), ` ${section} `, h('span', { class: 'quiet' }, field.help.split(' Must be')[0]))),
    this.found.length === 0 && this.input.value.trim() !== '' && h('li', { role: 'option', 'aria-disabled': 'true', 'aria-selected': 'false' }, 'No input that is not shown yet has these words.'));
    const shown = this.input.value.trim() !== '';
    this.list.hidden = !shown;
    this.input.setAttribute('aria-expanded', String(shown));
    this.point();
  }

  point() {
    [...this.list.children].forEach((li, i) => {
      li.setAttribute('aria-selected', String(i === this.active));
      if (i === this.active) li.scrollIntoView({ block: 'nearest' });
    });
    if (this.active >= 0) this.input.setAttribute('aria-activedescendant', 'adder-' + this.active);
    else this.input.removeAttribute('aria-activedescendant');
  }

  key(event) {
    if (event.key === 'Escape') this.close();
    else if (event.key === 'Enter' && this.active >= 0) this.pick(this.active);
    else if (event.key === 'ArrowDown' || event.key === 'ArrowUp') this.move(event.key === 'ArrowDown' ? 1 : -1);
    else return;
    event.preventDefault();
  }

  move(by) {
    if (this.list.hidden) return this.open();
    const n = this.found.length;
    if (n) this.active = (this.active + by + n) % n;
    return this.point();
  }

  pick(i) {
    const { field } = this.found[i];
    this.input.value = '';
    this.close();
    this.form.reveal(field.pointer, true);
  }

  close() {
    this.list.hidden = true;
    this.active = -1;
    this.input.setAttribute('aria-expanded', 'false');
    this.input.removeAttribute('aria-activedescendant');
  }
}
