// Making elements. Text always enters the document as text.

const svgSpace = 'http://www.w3.org/2000/svg';

// h makes an element of HTML: h('a', {href: '#x', class: 'y', onclick: f}, 'text', child).
// A property that is undefined, null or false is left out.
export const h = (tag, properties, ...children) => fill(document.createElement(tag), properties, children);

// s makes an element of SVG.
export const s = (tag, properties, ...children) => fill(document.createElementNS(svgSpace, tag), properties, children);

function fill(element, properties, children) {
  for (const [name, value] of Object.entries(properties ?? {})) {
    if (value === undefined || value === null || value === false) continue;
    if (name.startsWith('on')) element.addEventListener(name.slice(2), value);
    else element.setAttribute(name, value === true ? '' : String(value));
  }
  append(element, children);
  return element;
}

function append(element, children) {
  for (const child of children.flat(Infinity)) {
    if (child === undefined || child === null || child === false || child === '') continue;
    element.append(child instanceof Node ? child : String(child));
  }
}

// put replaces what an element holds.
export function put(element, ...children) {
  element.replaceChildren();
  append(element, children);
  return element;
}

export const at = (id) => document.getElementById(id);

// picture shows one of the drawings that the page holds. It says nothing to
// those who can't see it: the text beside it does.
export const picture = (id, name) => s('svg', { class: name, 'aria-hidden': 'true', focusable: 'false' }, s('use', { href: '#' + id }));

// later returns a function that calls f once no call came for a while; its
// member now calls it at once.
export function later(f, milliseconds) {
  let timer = 0;
  const call = () => {
    clearTimeout(timer);
    timer = setTimeout(f, milliseconds);
  };
  call.now = () => {
    clearTimeout(timer);
    f();
  };
  return call;
}

const takesFocus = 'input, select, textarea, button, a, summary, [tabindex]';

// focusIn remembers which part of an element has the focus, and returns a
// function that gives it back once the element was made anew.
export function focusIn(element) {
  const active = document.activeElement;
  if (!element.contains(active)) return () => {};
  const holder = active.closest('[id]');
  const place = [...holder.querySelectorAll(takesFocus)].indexOf(active);
  return () => {
    const again = at(holder.id);
    (again?.querySelectorAll(takesFocus)[place] ?? again)?.focus({ preventScroll: true });
  };
}

// go moves to an element, opens what hides it, and gives it the focus.
export function go(element) {
  for (let fold = element.closest('details'); fold; fold = fold.parentElement.closest('details')) fold.open = true;
  const target = element.matches(takesFocus) ? element : element.querySelector('input, select, textarea') ?? element.querySelector(takesFocus) ?? element;
  if (!target.matches(takesFocus)) target.tabIndex = -1;
  target.focus({ preventScroll: true });
  element.scrollIntoView({ block: element.matches('section') ? 'start' : 'nearest' });
}
