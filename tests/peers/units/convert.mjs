// Reads a JSON array of [value, from, to] from standard input and writes an array of numbers; null where the library refuses.
import ucum from '@lhncbc/ucum-lhc';
import { readFileSync } from 'node:fs';

const units = ucum.UcumLhcUtils.getInstance();
const asked = JSON.parse(readFileSync(0, 'utf8'));

// charge 1: equivalents are converted as those of ions with one charge.
const answers = asked.map(([value, from, to]) => {
  const answer = units.convertUnitTo(from, value, to, { charge: 1 });
  return answer.status === 'succeeded' ? answer.toVal : null;
});

process.stdout.write(JSON.stringify(answers));
