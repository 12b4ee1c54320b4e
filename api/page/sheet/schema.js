// What a case may hold, read from the catalogue and from the schema of a case.
// The page names no field of its own.

import { get, joined } from './case.js';

// Sections of the sheet, in order: the blocks of a case that each gathers. A
// block that the service adds comes last, as a section of its own.
const order = ['structure', 'fluid', 'flow', 'waves', 'motion', 'surroundings', 'study', 'active', 'given_groups'];
const gathered = { study: ['', 'tolerance', 'criteria'] };
const titles = { structure: 'Structure', study: 'What counts', surroundings: 'Surroundings' };
const docs = { study: 'Which measures are of interest, the error that is accepted, and criteria of standards that decide.' };

const ask = async (path) => {
  const response = await fetch(path, { headers: { Accept: 'application/json, application/schema+json' } });
  if (!response.ok) throw new Error(`${path} answers ${response.status}`);
  return response.json();
};

export async function load() {
  const [kinds, classes, schema, shipped] = await Promise.all(
    ['/v1/catalog/kinds', '/v1/catalog/classes', '/v1/schema/case', '/examples.json'].map(ask));
  return new Sheet(kinds.records, classes.records, schema, shipped.examples);
}

// Sheet knows the kinds, the blocks and the fields of a case.
export class Sheet {
  constructor(kinds, classes, schema, examples) {
    this.classes = classes;
    this.examples = examples;
    this.schema = schema;
    this.units = unitsIn(kinds);
    this.kinds = kinds.map((k) => ({ ...k, block: this.kindBlock(k.name) })).filter((k) => k.block);
    this.blocks = Object.entries(schema.properties).map(([name, node]) => this.block(name, node)).filter((b) => b);
    this.root = this.fields('', schema.properties).filter((f) => !this.blocks.some((b) => b.name === f.name) && f.name !== 'structure');
    this.made = new Map();
  }

  kindBlock(name) {
    const all = this.schema.properties.structure.oneOf.map((ref) => this.resolve(ref));
    return all.find((b) => b.properties.kind?.const === name);
  }

  resolve(node) {
    return node.$ref ? this.schema.$defs[node.$ref.split('/').pop()] : node;
  }

  // block describes an object of a case, and the field that a bare text in its
  // place stands for.
  block(name, node) {
    const shorthand = node.oneOf?.find((n) => n.enum);
    const whole = this.resolve(node.oneOf?.find((n) => n.$ref) ?? node);
    if (name === 'structure' || !whole?.properties) return undefined;
    const fields = this.fields('/' + name, whole.properties);
    const stands = shorthand && fields.find((f) => String(f.options) === String(shorthand.enum));
    return { name, title: whole.title, doc: whole.description, fields, shorthand: stands?.name };
  }

  fields(prefix, properties, needed = []) {
    return Object.entries(properties).filter(([name]) => name !== 'kind')
      .map(([name, node]) => this.field(joined(prefix, name), name, node, needed.includes(name)));
  }

  field(pointer, name, node, needed) {
    const help = node.description ?? '';
    const f = {
      pointer, name, needed, help, label: node.title ?? plain(name), options: node.enum,
      example: node.examples?.[0], preset: node.default, fallback: / Default: (.*)\.$/.exec(help)?.[1],
    };
    const shape = node.anyOf?.[0] ?? node;
    if (shape.$ref) return Object.assign(f, this.quantity(shape.$ref));
    if (node.enum) return Object.assign(f, { type: 'choice' });
    if (node.type !== 'array') return Object.assign(f, { type: node.type === 'string' ? 'text' : node.type });
    if (node.items.enum) return Object.assign(f, { type: 'choices', options: node.items.enum });
    if (node.items.$ref) return Object.assign(f, this.quantity(node.items.$ref), { type: 'interval' });
    return Object.assign(f, { type: 'rows', title: node.items.title, row: this.fields('', node.items.properties) });
  }

  quantity(ref) {
    const measure = this.resolve({ $ref: ref }).title.toLowerCase();
    return { type: 'quantity', measure, unit: this.units.get(measure), isNumber: measure === 'dimensionless' };
  }

  kind(name) {
    return this.kinds.find((k) => k.name === name);
  }

  // fieldsOf lists the fields of a block, of a structure of a kind.
  fieldsOf(block, kind) {
    if (block !== 'structure') return this.blocks.find((b) => b.name === block)?.fields ?? [];
    const whole = this.kind(kind)?.block;
    if (!whole) return [];
    if (!this.made.has(kind)) this.made.set(kind, this.fields('/structure', whole.properties, whole.required));
    return this.made.get(kind);
  }

  // sections are the parts of the sheet of a kind, with their fields.
  sections(kind) {
    const taken = new Set(Object.values(gathered).flat());
    const names = [...order, ...this.blocks.map((b) => b.name).filter((n) => !order.includes(n) && !taken.has(n))];
    return names.map((name) => this.section(name, kind)).filter((s) => s.fields.length);
  }

  section(name, kind) {
    const block = name === 'structure' ? this.kind(kind)?.block : this.blocks.find((b) => b.name === name);
    const fields = (gathered[name] ?? [name]).flatMap((part) => (part ? this.fieldsOf(part, kind).map((f) => (gathered[name] ? within(part, f) : f)) : this.study()));
    return { name, title: titles[name] ?? block?.title ?? plain(name), doc: docs[name] ?? block?.doc ?? block?.description ?? '', fields };
  }

  // labelOf names the field at a place, or in which a place lies.
  labelOf(pointer, kind) {
    const all = this.sections(kind).flatMap((s) => s.fields);
    const f = all.find((x) => x.pointer === pointer) ?? all.find((x) => pointer.startsWith(x.pointer + '/'));
    if (!f) return plain(pointer.split('/').pop());
    if (f.pointer === pointer) return f.label;
    const [at, name] = pointer.slice(f.pointer.length + 1).split('/');
    if (f.type === 'interval') return `${f.label}, ${at === '0' ? 'from' : 'to'}`;
    return `${f.label}, ${Number(at) + 1}: ${f.row?.find((x) => x.name === name)?.label.toLowerCase() ?? name}`;
  }

  study() {
    return this.root.filter((f) => f.type !== 'text');
  }

  labels() {
    return this.root.filter((f) => f.type === 'text');
  }

  // usual are the pointers that stand on the sheet from the start: the title,
  // what a case needs, and what more than a third of the demo cases of the kind
  // give.
  usual(kind) {
    const of = this.examples.filter((e) => e.case.structure.kind === kind);
    const all = [...this.labels(), ...this.sections(kind).flatMap((s) => s.fields)];
    const counts = (f) => of.filter((e) => get(this.normal(e.case), f.pointer) !== undefined).length;
    return new Set(all.filter((f) => f.needed || f === all[0] || counts(f) > of.length / 3).map((f) => f.pointer));
  }

  // normal returns a case in which every block is an object.
  normal(kase) {
    const result = { ...kase };
    for (const b of this.blocks) {
      if (b.shorthand && typeof result[b.name] === 'string') result[b.name] = { [b.shorthand]: result[b.name] };
    }
    return result;
  }
}

// within names a field after its block, where a section gathers several.
const within = (block, f) => ({ ...f, label: f.name === 'preset' ? plain(block) : `${plain(block)}: ${f.label.toLowerCase()}` });

export const plain = (name) => {
  const words = name.replaceAll('_', ' ');
  return words.charAt(0).toUpperCase() + words.slice(1);
};

// unitsIn collects the SI unit of each kind of quantity.
function unitsIn(kinds) {
  const units = new Map();
  for (const k of kinds) for (const f of k.fields) if (f.quantity) units.set(f.quantity, f.unit);
  return units;
}
