// The case and its answer in forms to take away.

import { h } from './dom.js';
import { shown, quantityShown, times } from './quantity.js';
import { toLink } from './case.js';
import { report } from './service.js';

// Copies holds the buttons and the text that they make. The text is always shown
// too: a browser may refuse to copy.
export class Copies {
  constructor(current, say) {
    this.text = h('textarea', { id: 'copied', rows: '8', readonly: true, spellcheck: 'false' });
    this.label = h('label', { for: 'copied' }, 'Text');
    this.out = h('div', { hidden: true }, this.label, this.text);
    this.say = say;
    const button = (id, name, make) => h('button', { type: 'button', id: 'copy-' + id, onclick: () => this.take(name, make(current())) }, name);
    const download = (format, name) => h('button', { type: 'button', id: 'save-' + format, onclick: () => this.save(format, current()) }, name);
    this.saved = h('p', { hidden: true });
    this.element = h('div', { class: 'copies' }, h('p', { class: 'tools' },
      button('link', 'Copy link', ({ kase }) => link(kase)),
      button('json', 'Copy JSON', ({ kase }) => JSON.stringify(kase, null, 2)),
      button('curl', 'Copy curl line', ({ kase }) => curl(kase)),
      button('markdown', 'Copy Markdown', ({ kase, answer }) => markdown(kase, answer))),
    h('p', { class: 'quiet' }, 'The link holds the case itself, behind the #: no server sees it.'),
    h('p', { class: 'tools' }, download('html', 'Save report to print'), download('md', 'Save report in Markdown'), download('png', 'Save chart of margins (PNG)')), this.saved, this.out);
  }

  // save asks the service for a report on the case that is answered, and hands it
  // to the browser as a file.
  async save(format, { kase, answer }) {
    const result = await report(kase, format);
    const name = `regimed-${(answer.reference ?? answer.title ?? answer.kind).replace(/[^\p{L}\p{N}]+/gu, '-').slice(0, 40)}-${answer.digest.slice(0, 8)}.${format}`;
    if (result.blob) download(result.blob, name);
    this.saved.hidden = false;
    this.saved.textContent = result.blob ? `Saved as ${name}.` : result.failure ?? 'The service refuses this case.';
    this.say(this.saved.textContent);
  }

  async take(name, text) {
    this.out.hidden = false;
    this.text.value = text;
    try {
      await navigator.clipboard.writeText(text);
      this.label.textContent = name.replace('Copy', 'Copied:');
    } catch {
      this.label.textContent = 'The browser does not let the page copy; take the text from here:';
      this.text.focus();
      this.text.select();
    }
    this.say(this.label.textContent);
  }
}

function download(blob, name) {
  const href = URL.createObjectURL(blob);
  h('a', { href, download: name }).click();
  setTimeout(() => URL.revokeObjectURL(href), 60_000); // a browser may read it late
}

export const link = (kase) => `${location.origin}/#case=${toLink(kase)}`;

// curl is a line for a shell, with the case between single quotes.
function curl(kase) {
  const quoted = (text) => `'${text.replaceAll("'", `'\\''`)}'`;
  return `curl -s -H 'Content-Type: application/json' --data ${quoted(JSON.stringify(kase))} ${quoted(location.origin + '/v1/classify')}`;
}

// cell makes a text fit for a cell of a table in Markdown.
const cell = (text) => String(text).replace(/\s+/g, ' ').replace(/[\\|`*_<>[\]]/g, '\\$&');

function markdown(kase, a) {
  const r = a.recommendation;
  const rows = [
    ['Case', [a.title, a.reference && `(${a.reference})`].filter(Boolean).join(' ') || 'untitled'],
    ['Kind', a.kind],
    ['Model class', `${r.title} (${r.class})${r.provisional ? ', provisional' : ''}`],
    ['Solves', r.solves],
    ['Axes', Object.entries(r.axes).map(([axis, value]) => `${axis.replaceAll('_', ' ')}: ${value}`).join(', ')],
    ...r.conditions.map((c) => ['Condition', c]),
    ...r.rejected.map((x) => [`Ruled out: ${x.title}`, x.because.join(', ')]),
    ...a.frequencies.map((f) => [`Frequency, ${f.title.replace('natural frequency, ', '')}`, quantityShown(f.value, f.unit, 4)]),
    ...Object.entries(a.findings).filter(([, f]) => f.verdict === 'invalid' || f.verdict === 'marginal').map(([id, f]) => [`${id}: ${f.verdict}`, `${times(f.utilisation)} of the limit, φ ${shown(f.factor)}`]),
    ...a.warnings.map((w) => ['Warning', w.sentence]),
    ...a.cautions.map((c) => ['Caution', c]),
    ['Engine', `${a.engine.version}, catalogue ${a.engine.catalogue.slice(0, 12)}, case ${a.digest.slice(0, 12)}`],
  ];
  return ['| | |', '|---|---|', ...rows.map(([name, value]) => `| ${cell(name)} | ${cell(value)} |`), '', `[The case](${link(kase)})`, ''].join('\n');
}
