// The case as plain data: places in it by JSON Pointer, its order, and the link
// that holds it.

const unescape = (part) => part.replaceAll('~1', '/').replaceAll('~0', '~');

export const parts = (pointer) => pointer.split('/').slice(1).map(unescape);

export const joined = (pointer, part) => pointer + '/' + String(part).replaceAll('~', '~0').replaceAll('/', '~1');

const isObject = (x) => typeof x === 'object' && x !== null;

const own = (x, name) => (isObject(x) && Object.hasOwn(x, name) ? x[name] : undefined);

// get returns what stands at a place, undefined where nothing does.
export const get = (kase, pointer) => parts(pointer).reduce(own, kase);

// set puts a value at a place, and makes the objects and lists on the way.
export function set(kase, pointer, value) {
  const path = parts(pointer);
  const last = path.pop();
  let node = kase;
  path.forEach((part, i) => {
    if (!isObject(own(node, part))) define(node, part, /^\d+$/.test(path[i + 1] ?? last) ? [] : {});
    node = node[part];
  });
  define(node, last, value);
}

// define keeps a name such as __proto__ an ordinary one.
const define = (node, name, value) => Object.defineProperty(node, name, { value, writable: true, enumerable: true, configurable: true });

// remove takes a value away, and the objects that are empty then.
export function remove(kase, pointer) {
  const path = parts(pointer);
  const last = path.pop();
  const node = path.reduce(own, kase);
  if (!isObject(node)) return;
  if (Array.isArray(node)) node.splice(Number(last), 1);
  else delete node[last];
  if (path.length && Object.keys(node).length === 0) remove(kase, path.map((p) => joined('', p)).join(''));
}

export const copy = (x) => structuredClone(x);

// ordered returns the case with its members in the order of the sheet; those
// that it doesn't know come last.
export function ordered(kase, sheet) {
  const result = {};
  const order = (from, names, to) => {
    for (const name of [...names, ...Object.keys(from)]) {
      if (Object.hasOwn(from, name) && !Object.hasOwn(to, name)) define(to, name, from[name]);
    }
    return to;
  };
  order(kase, ['title', 'reference', 'structure', ...sheet.blocks.map((b) => b.name)], result);
  for (const [name, value] of Object.entries(result)) {
    if (!isObject(value) || Array.isArray(value)) continue;
    define(result, name, order(value, ['kind', ...sheet.fieldsOf(name, own(result.structure, 'kind')).map((f) => f.name)], {}));
  }
  return result;
}

// fromText reads a case that someone pasted. It throws a sentence.
export function fromText(text) {
  let value;
  try {
    value = JSON.parse(text.replace(/^\uFEFF/, ''));
  } catch (error) {
    throw new Error('This is no JSON: ' + error.message, { cause: error });
  }
  if (!isObject(value) || Array.isArray(value)) throw new Error('This is JSON, but no object: a case begins with {.');
  return isObject(value.case) && !value.structure ? value.case : value; // a file with its expectations
}

// toLink and fromLink keep a case in the fragment of an address, which no
// server sees and no log keeps.
export function toLink(kase) {
  const bytes = new TextEncoder().encode(JSON.stringify(kase));
  const text = Array.from(bytes, (b) => String.fromCharCode(b)).join('');
  return btoa(text).replaceAll('+', '-').replaceAll('/', '_').replace(/=+$/, '');
}

export function fromLink(code) {
  const text = atob(code.replaceAll('-', '+').replaceAll('_', '/'));
  return fromText(new TextDecoder('utf-8', { fatal: true }).decode(Uint8Array.from(text, (c) => c.charCodeAt(0))));
}
