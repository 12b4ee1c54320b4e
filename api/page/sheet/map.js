// A map of the classes over two inputs, drawn by the service when it is asked
// for.

import { h, put } from './dom.js';
import { map } from './service.js';

export class RegimeMap {
  constructor(say) {
    this.say = say;
    this.x = h('select', { id: 'map-x' });
    this.y = h('select', { id: 'map-y' });
    this.draw = h('button', { type: 'button', id: 'map-draw', onclick: () => this.ask() }, 'Draw the map');
    this.out = h('div', { class: 'map' });
    this.element = h('div', {}, h('p', { class: 'quiet' }, 'Which class is recommended over two inputs, all others as they are.'),
      h('p', { class: 'tools' }, h('label', { class: 'axis-of-map' }, 'Across ', this.x), h('label', { class: 'axis-of-map' }, 'Upwards ', this.y), this.draw), this.out);
  }

  // offer lists the inputs of a case that can span a map, and keeps those that
  // are picked. A drawing of the case as it was goes.
  offer(kase, inputs) {
    this.running?.abort();
    this.kase = kase;
    put(this.out);
    for (const [i, select] of [this.x, this.y].entries()) {
      const was = select.value;
      put(select, inputs.map((input) => h('option', { value: input.name }, `${input.label} (${input.name})`)));
      const kept = inputs.some((input) => input.name === was);
      select.value = kept ? was : inputs[Math.min(i, inputs.length - 1)]?.name ?? '';
    }
    this.draw.disabled = inputs.length < 2;
  }

  async ask() {
    if (this.x.value === this.y.value) return this.tell('A map needs two different inputs.');
    this.running?.abort();
    this.running = new AbortController();
    const { signal } = this.running;
    put(this.out, h('p', { class: 'quiet' }, 'The map is being drawn…'));
    this.out.setAttribute('aria-busy', 'true');
    const result = await map(this.kase, this.x.value, this.y.value, signal);
    this.out.removeAttribute('aria-busy');
    if (signal.aborted) return undefined;
    if (!result.drawing) return this.tell(result.failure ?? result.violations.map((v) => v.detail).join(' '));
    const alt = described(result.drawing);
    put(this.out, h('img', { src: 'data:image/svg+xml,' + encodeURIComponent(result.drawing), alt }), h('p', { class: 'quiet', 'aria-hidden': 'true' }, alt));
    return this.say('The map is drawn. ' + alt);
  }

  tell(text) {
    put(this.out, h('p', {}, text));
    this.say(text);
  }
}

const entities = { amp: '&', lt: '<', gt: '>', quot: '"', '#34': '"', '#39': '\'', apos: '\'' };

// described is what a drawing says of itself to those who can't see it.
function described(drawing) {
  const text = /<desc>([^<]*)<\/desc>/.exec(drawing)?.[1] ?? 'Map of the recommended class of model.';
  return text.replace(/&(#?\w+);/g, (all, name) => entities[name] ?? all);
}
