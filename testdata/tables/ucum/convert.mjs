// Converts every unit of codes.csv that has a UCUM code to SI with a general-purpose
// UCUM library, and prints factors.csv: 1 and 100 of each unit, and the version.
//
// To run, in a temporary folder:
//   npm install @lhncbc/ucum-lhc
//   node <repository>/testdata/tables/ucum/convert.mjs > factors.csv
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { join } from 'node:path';

const require = createRequire(join(process.cwd(), 'index.js'));
const name = '@lhncbc/ucum-lhc';
const { version } = require(name + '/package.json');
const ucum = require(name).UcumLhcUtils.getInstance();

const convert = (code, x, si) => {
  const r = ucum.convertUnitTo(code, x, si);
  if (r.status !== 'succeeded') throw new Error(`${code} to ${si}: ${r.msg.join('; ')}`);
  return r.toVal;
};

const [, ...rows] = readFileSync(new URL('codes.csv', import.meta.url), 'utf8').trim().split('\n');
console.log('unit,si,of_1,of_100,library,version');
for (const row of rows) {
  const [unit, code, si, ucumSI] = row.split(',');
  if (code) console.log([unit, si, convert(code, 1, ucumSI), convert(code, 100, ucumSI), name, version].join(','));
}
