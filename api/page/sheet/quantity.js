// Numbers as people write and read them. Nothing here knows a unit, but for the
// two scales of temperature that don't count from zero: what a unit means is for
// the service to say.

const number = String.raw`[-+−]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][-+−]?\d+)?`;
const first = new RegExp(String.raw`^\s*(${number})`);
const plusMinus = String.raw`(?:±|\+\s*/?\s*[-−])`;
const second = new RegExp(String.raw`(${plusMinus}|\.\.|…)(\s*)(${number})(\s*%)?`);

const read = (text) => Number(text.replaceAll('−', '-'));

// leading is the number with which a text begins; NaN if there is none.
export function leading(text) {
  const m = first.exec(text);
  return m ? read(m[1]) : NaN;
}

// isNumber reports whether a text is a finite number and nothing else.
export function isNumber(text) {
  return new RegExp(String.raw`^\s*${number}\s*$`).test(text) && Number.isFinite(read(text));
}

export const toNumber = read;

// textOf is a value of a case as one line of text.
export function textOf(value) {
  if (value === undefined || value === null) return '';
  if (typeof value === 'object') return inParts(value) ?? JSON.stringify(value);
  return String(value);
}

// inParts writes a quantity that came in parts as one text, where a text can
// say the same.
function inParts(v) {
  const has = Object.keys(v).sort().join(' ');
  const unit = v.unit ? ' ' + v.unit : '';
  switch (has) {
    case 'unit value': return `${v.value}${unit}`;
    case 'std unit value': return `${v.value} +- ${v.std}${unit}`;
    case 'percent unit value': return `${v.value}${unit} +- ${v.percent} %`;
    case 'high low unit': return `${v.low} .. ${v.high}${unit}`;
  }
  return undefined;
}

// offsets of the scales of temperature: absolute zero lies at −offset.
const scales = [[/(°C|℃|\bdegC\b)/, 273.15], [/(°F|℉|\bdegF\b)/, 459.67]];

const scaleOf = (text) => scales.find(([unit]) => unit.test(text));

// scaled multiplies a quantity that stands in a text, its uncertainty with it,
// and keeps its unit. A temperature is multiplied from absolute zero; another
// scale that doesn't count from zero needs a shift, in its unit.
export function scaled(text, factor, digits = 4, shift = scaleOf(text)?.[1] ?? 0) {
  const times = (x) => plain((x + shift) * factor - shift, shift ? digits + 1 : digits);
  const m = first.exec(text);
  if (!m) return text;
  const rest = text.slice(m[0].length);
  const inPercent = /^\s*%/.test(rest);
  const scaledRest = rest.replace(second, (all, sign, space, x, percent) => {
    if (percent && !inPercent) return all; // a share of the value stays one
    const isEnd = sign === '..' || sign === '…';
    return sign + space + (isEnd ? times(read(x)) : plain(read(x) * factor, 3)) + (percent ?? '');
  });
  return times(read(m[1])) + scaledRest;
}

// plain writes a number with so many significant digits, in a form that can be
// read back.
export function plain(x, digits = 4) {
  if (x === 0 || !Number.isFinite(x)) return String(x);
  const size = Math.abs(x);
  if (size >= 1e6 || size < 1e-4) return Number(x.toPrecision(digits)).toExponential().replace('e+', 'e');
  return String(Number(x.toPrecision(digits)));
}

const raised = { '-': '⁻', 0: '⁰', 1: '¹', 2: '²', 3: '³', 4: '⁴', 5: '⁵', 6: '⁶', 7: '⁷', 8: '⁸', 9: '⁹' };
const raise = (digits) => [...digits].map((d) => raised[d]).join('');

// shown writes a number for people: 1.2×10⁻⁶ for what would be long.
export function shown(x, digits = 3) {
  if (typeof x !== 'number' || !Number.isFinite(x)) return '–';
  if (Math.abs(x) >= 10 ** digits && Math.abs(x) < 1e6) return grouped(Math.round(Number(x.toPrecision(digits))));
  const [mantissa, exponent] = plain(x, digits).split('e');
  return mantissa.replace('-', '−') + (exponent === undefined ? '' : '×10' + raise(exponent));
}

// grouped sets the digits of a whole number in groups of three, from five on.
const grouped = (x) => (Math.abs(x) < 1e4 ? String(x) : String(x).replace(/\B(?=(\d{3})+$)/g, '\u202f')).replace('-', '−');

// unitShown writes a unit with raised powers: kg/m3 becomes kg/m³.
export const unitShown = (unit) => (unit === '1' ? '' : unit.replace(/([A-Za-zΩ°])(-?\d+)/g, (_, letter, power) => letter + raise(power)));

const prefixes = [[1e9, 'G'], [1e6, 'M'], [1e3, 'k'], [1, ''], [1e-3, 'm'], [1e-6, 'µ'], [1e-9, 'n']];
const takesPrefix = new Set(['m', 's', 'Hz', 'Pa', 'N', 'W', 'J']);
const never = { m: new Set(['G', 'M']), s: new Set(['G', 'M', 'k']) };

// quantityShown writes an SI value for people, with a prefix where that is usual.
export function quantityShown(value, unit, digits = 3) {
  if (typeof value !== 'number' || !Number.isFinite(value)) return '–';
  if (!takesPrefix.has(unit) || value === 0) return `${shown(value, digits)} ${unitShown(unit)}`.trim();
  const size = Math.abs(Number(value.toPrecision(digits)));
  const fits = prefixes.filter(([, p]) => !never[unit]?.has(p));
  const [factor, prefix] = fits.find(([f]) => size >= f) ?? fits.at(-1);
  return `${shown(value / factor, digits)} ${prefix}${unit}`;
}

// times writes how often the limit is used up.
export const times = (u) => (u >= 1e4 ? '> 10⁴' : u < 1e-3 ? '< 0.001' : shown(u, 3));

// ends writes the outer ones of three quantiles; nothing where they are one.
export function ends(quantiles, write = shown) {
  const [low, , high] = quantiles ?? [];
  return typeof low !== 'number' || typeof high !== 'number' || write(low) === write(high) ? '' : `${write(low)} … ${write(high)}`;
}

// share writes a probability in per cent.
export const share = (p) => (p > 0 && p < 0.005 ? '< 1 %' : p < 1 && p > 0.995 ? '> 99 %' : `${Math.round(p * 100)} %`);
