/**
 * The best lift beside cbe over 200 seeded random small models; prints a Markdown table of counts.
 *
 *     npm run bench -- lift-against-cbe
 *
 * `equal` is within 1e-6 (relative to the larger of 1 and cbe); `below` counts the rest that have a lift, with the least, median and
 * largest distance; `none` had no lift, or none within the limits on size.
 */
import { type BestCertificate, bestCertificate } from '../test/helpers/best-certificate.js';
import { RANDOM_FAMILIES, randomSmallModel } from '../test/helpers/random-small-models.js';

const COUNT = 200;

const results = Array.from({ length: COUNT }, (_, k) => {
  const { family, generator } = randomSmallModel(k);
  return { family, ...bestCertificate(generator) };
});

function row(name: string, all: readonly BestCertificate[]): string[] {
  const finite = all.filter(({ cbe }) => cbe > -Infinity);
  const distances = finite
    .filter(({ optimum, closed }) => optimum !== null && !closed)
    .map(({ cbe, optimum }) => cbe - (optimum ?? NaN))
    .sort((a, b) => a - b);
  const spread = [distances[0], distances[distances.length >> 1], distances.at(-1)].map((x) => x?.toPrecision(2));
  const graded = (grade: string): string => String(all.filter((each) => each.grade === grade).length);
  return [
    name,
    String(all.length),
    String(all.length - finite.length),
    String(finite.filter(({ closed }) => closed).length),
    String(distances.length),
    distances.length > 0 ? spread.join(' … ') : '',
    String(finite.filter(({ optimum }) => optimum === null).length),
    graded('exact'),
    graded('enclosed'),
    graded('certified'),
  ];
}

const HEAD = ['models', 'count', 'cbe −∞', 'equal', 'below', 'by', 'none', 'exact', 'enclosed', 'certified'];
const rows = RANDOM_FAMILIES.map(({ name }) => row(name, results.filter(({ family }) => family === name))); // prettier-ignore
const table = [HEAD, HEAD.map(() => '---'), ...rows, row('all', results)];
process.stdout.write(`${table.map((cells) => `| ${cells.join(' | ')} |`).join('\n')}\n`);
