/** The probability over n as an SVG: a few lines of drawing, no library. */
import { smallest } from 'hullgauge';
import { logSpaced } from 'hullgauge/plan';

const size = { height: 330, left: 62, right: 20, top: 24, bottom: 48 };
/** Widths of the drawing; words keep their size, so a narrow screen gets a narrow drawing. */
const widths = { least: 280, most: 900 };
/** Probabilities between which the curve is drawn, by what it shows. */
const depth = { value: 0.001, tails: 1e-12 };
/** A larger range of n is drawn on a logarithmic axis. */
const decades = 100;
const points = 121;

/** The numbers of points over which a question is worth drawing, with the marked ones among them. */
export function gridFor({ question, args }, marks, shows) {
  const rises = question.form !== 'atMost';
  const low = depth[shows];
  const ends = (rises ? [low, { complementAtMost: low }] : [{ atMost: 1 - low }, { atMost: low }])
    .map((target) => {
      try {
        return smallest(question.ask, 'n', args, target).value;
      } catch {
        return undefined; // Never reached: the marks have to do.
      }
    })
    .concat(marks)
    .filter((n) => n >= 1 && n < 1e300);
  if (ends.length === 0) return [];
  const from = Math.min(...ends);
  const to = Math.max(from + 1, ...ends);
  if (to / from >= decades) {
    return logSpaced(from, to, Math.max(1, Math.floor(points / Math.log10(to / from))));
  }
  const step = Math.max(1, (to - from) / (points - 1));
  const grid = [];
  for (let i = 0; from + i * step < to; i++) grid.push(Math.round(from + i * step));
  return [...grid, to];
}

/** The drawing for a place so many pixels wide. `marks` are `{ n, text }`: the chosen n and the smallest one. */
export function drawing(rows, marks, shows, room) {
  const width = Math.max(widths.least, Math.min(widths.most, Math.floor(room)));
  const ns = rows.map(({ n }) => n);
  const x = horizontal(Math.min(...ns), Math.max(...ns), width);
  const read = { value: (p) => p.value, tails: (p) => p.log / Math.LN10 };
  const other = (p) => p.logComplement / Math.LN10;
  const curves = [
    { name: shows === 'value' ? 'P' : 'log10 P', kind: 'own', at: read[shows] },
    ...(shows === 'value' ? [] : [{ name: 'log10 (1 - P)', kind: 'other', at: other }]),
  ];
  const finite = rows.flatMap(({ p }) => curves.map(({ at }) => at(p))).filter(Number.isFinite);
  const y = vertical(shows === 'value' ? 0 : Math.min(-1, ...finite), shows === 'value' ? 1 : 0);
  const lines = curves.map(({ name, kind, at }, i) => {
    const path = rows
      .filter(({ p }) => Number.isFinite(at(p)))
      .map(({ n, p }, k) => `${k ? 'L' : 'M'}${place(x.at(n))} ${place(y.at(at(p)))}`)
      .join('');
    return `<path class="curve ${kind}" d="${path}"/>${text(size.left + 8 + 90 * i, 14, name, `start ${kind}`)}`;
  });
  const shown = marks.filter(({ n }) => n >= ns[0] && n <= ns[ns.length - 1]);
  const least = Math.min(...shown.map(({ n }) => n));
  const rules = shown.map(
    ({ n, kind }) =>
      `<path class="mark ${kind}" d="M${place(x.at(n))} ${size.top}V${size.height - size.bottom}"/>`,
  );
  // Words of the lower mark stand left of it, those of the other right of it, where there is room.
  const names = shown.map(({ n, text: words }, i) => {
    const at = place(x.at(n));
    const long = 7.5 * words.length + 5;
    const fits = { left: at - size.left > long, right: width - at > long };
    const left = n === least && shown.length > 1 ? fits.left || !fits.right : !fits.right;
    const y = size.height / 2 + 18 * i;
    return text(at + (left ? -5 : 5), y, words, `${left ? 'end' : 'start'} marked`);
  });
  const bottom = size.height - size.bottom;
  return `<svg viewBox="0 0 ${width} ${size.height}" width="${width}" height="${size.height}" role="img" aria-label="${describe(rows, marks)}">
${y.ticks.map((t) => `<path class="grid" d="M${size.left} ${place(y.at(t))}H${width - size.right}"/>${text(size.left - 8, place(y.at(t)) + 4, short(t), 'end')}`).join('')}
${x.ticks.map((t) => `<path class="grid" d="M${place(x.at(t))} ${size.top}V${bottom}"/>${text(place(x.at(t)), bottom + 18, short(t), 'middle')}`).join('')}
${text((size.left + width - size.right) / 2, size.height - 8, x.log ? 'number of points n, logarithmic' : 'number of points n', 'middle')}
${[...lines, ...rules, ...names].join('')}</svg>`;
}

function describe(rows, marks) {
  const [first, last] = [rows[0], rows[rows.length - 1]];
  const words = marks.map(({ text: words }) => words).join(', ');
  return `Probability over n: ${first.p} at n = ${first.n}, ${last.p} at n = ${last.n}; marked: ${words}`;
}

function horizontal(from, to, width) {
  const log = to / from >= decades;
  const scale = log ? Math.log : (n) => n;
  const span = scale(to) - scale(from);
  const at = (n) =>
    size.left + ((scale(n) - scale(from)) / span) * (width - size.left - size.right);
  // A tick takes some 60 pixels.
  const most = Math.max(2, Math.floor((width - size.left - size.right) / 60));
  if (!log) return { at, log, ticks: niceTicks(from, to, Math.min(5, most)) };
  const [low, high] = [Math.ceil(Math.log10(from) - 1e-9), Math.floor(Math.log10(to) + 1e-9)];
  const step = Math.ceil((high - low + 1) / Math.min(8, most));
  const ticks = [];
  for (let k = low; k <= high; k += step) ticks.push(Number(`1e${k}`));
  return { at, log, ticks };
}

function vertical(from, to) {
  const at = (v) =>
    size.height - size.bottom - ((v - from) / (to - from)) * (size.height - size.top - size.bottom);
  return { at, ticks: niceTicks(from, to, 5) };
}

/** About so many round numbers between two ends. */
function niceTicks(from, to, count) {
  const rough = (to - from) / count;
  const power = Number(`1e${Math.floor(Math.log10(rough))}`);
  const step = power * [1, 2, 5, 10].find((k) => k * power >= rough);
  const ticks = [];
  for (let k = Math.ceil(from / step); k * step <= to * (1 + 1e-12); k++) ticks.push(k * step);
  return ticks;
}

const place = (v) => Math.round(10 * v) / 10;
const short = (v) => {
  const text = String(Number(v.toPrecision(6)));
  return Math.abs(v) >= 1e5 ? v.toExponential().replace('e+', 'e') : text;
};
const text = (x, y, words, kind) => `<text x="${x}" y="${y}" class="${kind}">${words}</text>`;
