/**
 * The page: reads the fields, asks the library, and writes results, messages and the curve.
 *
 * Fields are named in index.html; the address holds their values after `#`, so a link reproduces them.
 */
import { LogNumber } from 'hullgauge';
import { answerTo, forms, laws } from './answer.mjs';
import { drawing, gridFor } from './curve.mjs';
import { questions } from './questions.mjs';

const form = document.querySelector('form');
const byId = (id) => document.getElementById(id);
const fields = () => Object.fromEntries(new FormData(form));
const questionNamed = (name) => questions.find(({ ask }) => ask.name === name);

const options = (rows) => rows.map(([value, label]) => new Option(label, value));
form.question.append(...options(questions.map(({ ask, title }) => [ask.name, title])));
form.law.append(...options(Object.entries(laws).map(([name, { label }]) => [name, label])));
form.form.append(...options(Object.entries(forms).map(([name, { label }]) => [name, label])));

/** Shows the fields that a question has. */
function arrange() {
  const question = questionNamed(form.question.value);
  const { shape } = laws[form.law.value];
  byId('assumes').textContent = `${question.ask.name}: ${question.assumes}`;
  byId('law-row').hidden = !question.law;
  byId('shape-row').hidden = !(question.law && shape);
  byId('shape-label').textContent = shape === 'b' ? 'Exponent b' : 'Degrees of freedom';
  byId('extra-row').hidden = !question.extra;
  byId('extra-label').textContent = question.extra?.label ?? '';
}

/** Puts the values that a question begins with. */
function begin(question) {
  form.question.value = question.ask.name;
  for (const [name, value] of Object.entries(question.start)) form[name].value = value;
  form.form.value = question.form ?? 'number';
}

/** Writes the messages at their fields, and says that they are wrong. */
function writeErrors(errors) {
  for (const message of document.querySelectorAll('.message')) {
    const name = message.id.replace(/-message$/, '');
    message.textContent = errors[name] ?? '';
    if (errors[name]) form[name]?.setAttribute('aria-invalid', 'true');
    else form[name]?.removeAttribute?.('aria-invalid');
  }
}

/** Twelve digits, with an exponent where zeros would fill the line. */
function digits(x) {
  if (!Number.isFinite(x)) return `${x}`;
  const short = Number(x.toPrecision(12));
  return x !== 0 && Math.abs(x) < 1e-4 ? short.toExponential() : String(short);
}
/** A tail, from its logarithm where doubles end. */
const tail = (value, log) =>
  value > 1e-300 || log === -Infinity ? digits(value) : `${LogNumber.fromLog(log)}`;

/** Rows of name and value. */
function rowsOf(list, rows) {
  list.replaceChildren(
    ...rows.flatMap(([name, value]) => {
      const term = document.createElement('dt');
      const data = document.createElement('dd');
      term.textContent = name;
      data.textContent = value;
      return [term, data];
    }),
  );
}

function writeProbability(p) {
  byId('headline').textContent = p === undefined ? '' : `P = ${p}`;
  const rows = p && [
    ['P', tail(p.value, p.log)],
    ['1 - P', tail(p.complement, p.logComplement)],
    ['ln P', digits(p.log)],
    ['ln (1 - P)', digits(p.logComplement)],
    ['error of ln', `at most ${p.logError.toPrecision(2)}`],
  ];
  rowsOf(byId('probability'), rows ?? []);
}

const points = (value, log) =>
  value > Number.MAX_SAFE_INTEGER ? `${LogNumber.fromLog(log)}` : String(value);

function writeAnswer(answer) {
  byId('smallest').textContent =
    answer === undefined ? '' : `n = ${points(answer.value, answer.log)}`;
  const rows = answer && [
    ['certain', answer.exact ? 'yes, to the integer' : 'within the bracket'],
    ['bracket', answer.bracket.map((n) => points(n, Math.log(n))).join(' to ')],
    ['P there', `${answer.probability}`],
    ['ln n', digits(answer.log)],
  ];
  rowsOf(byId('answer'), rows ?? []);
}

const mark = (n, name, kind) => ({ n, text: `${name} = ${points(n, Math.log(n))}`, kind });

let run = 0;
/** Draws the latest curve again, in the room that there is. */
let draw = () => {};

/** Answers the fields; a later call stops the drawing of an earlier one. */
async function update() {
  const mine = ++run;
  arrange();
  const given = fields();
  // Written without a new entry of the history.
  history.replaceState(null, '', `#${new URLSearchParams(given)}`);
  const result = answerTo(given);
  const { errors, probability, answer, n } = result;
  writeErrors(errors);
  writeProbability(probability);
  writeAnswer(answer);
  byId('code').textContent = Object.keys(errors).length === 0 ? result.code : '';
  await drawCurve(result, given.shows, [
    ...(probability && typeof n === 'number' ? [mark(n, 'n', 'chosen')] : []),
    ...(answer ? [mark(answer.value, 'smallest n', 'found')] : []),
  ]).catch((error) => {
    byId('form-message').textContent = error.message;
  });

  async function drawCurve({ question, args }, shows, marks) {
    const curve = byId('curve');
    curve.setAttribute('aria-busy', 'true');
    draw = () => curve.replaceChildren();
    if (args === undefined || probability === undefined || errors.d) draw();
    else {
      const grid = gridFor(
        { question, args },
        marks.map((mark) => mark.n),
        shows,
      );
      const rows = [];
      let pause = performance.now() + 30;
      for (const size of grid) {
        rows.push({ n: size, p: question.ask({ ...args, n: size }) });
        if (performance.now() < pause) continue;
        // Lets the page take a key press.
        await new Promise((resolve) => setTimeout(resolve));
        if (mine !== run) return;
        pause = performance.now() + 30;
      }
      draw = () => {
        if (rows.length > 1) curve.innerHTML = drawing(rows, marks, shows, curve.clientWidth);
      };
      draw();
    }
    curve.removeAttribute('aria-busy');
  }
}

addEventListener('resize', () => draw());
form.addEventListener('submit', (event) => {
  event.preventDefault();
  update();
});
form.addEventListener('change', (event) => {
  if (event.target === form.question) begin(questionNamed(form.question.value));
  update();
});

/** Takes the fields from the address. */
function follow() {
  const linked = new URLSearchParams(location.hash.slice(1));
  begin(questionNamed(linked.get('question')) ?? questions[0]);
  linked.delete('question');
  for (const [name, value] of linked) {
    const field = form.elements.namedItem(name);
    if (field === null) continue;
    const before = field.value;
    field.value = value;
    // A choice takes none but its own values.
    if (field.value !== value) field.value = before;
  }
  update();
}
// Writing the address fires no event; a link into the open page does.
addEventListener('hashchange', follow);
follow();
