/** From the texts of the fields to the library's answers, or to its own message for each field. */
import {
  betaLaw,
  betaPrimeLaw,
  gaussian,
  LogNumber,
  Probability,
  smallest,
  studentT,
  uniformBall,
  uniformSphere,
} from 'hullgauge';
import { questions } from './questions.mjs';

/** Laws by the name of the function that makes them; `shape` names the number that it takes. */
export const laws = {
  gaussian: { label: 'Gaussian', make: gaussian },
  uniformBall: { label: 'uniform in the ball', make: uniformBall },
  uniformSphere: { label: 'uniform on the sphere', make: uniformSphere },
  betaLaw: { label: 'beta law, (1 - |x|²)^b', shape: 'b', make: betaLaw },
  betaPrimeLaw: { label: 'beta-prime law, (1 + |x|²)^-b', shape: 'b', make: betaPrimeLaw },
  studentT: {
    label: 'Student t',
    shape: 'degreesOfFreedom',
    make: (degreesOfFreedom) => studentT({ degreesOfFreedom }),
  },
};

/** The forms of a target, as the reader chooses them and as `smallest` takes them. */
export const forms = {
  // As an object, so that a message about a text that is no number names what would be one.
  number: { label: 'P at least', make: (p) => ({ atLeast: p }), code: (p) => p },
  logAtLeast: {
    label: 'ln P at least',
    make: (log) => ({ atLeast: Probability.fromLog(log) }),
    code: (log) => `{ atLeast: Probability.fromLog(${log}) }`,
  },
  atMost: {
    label: 'P at most',
    make: (p) => ({ atMost: p }),
    code: (p) => `{ atMost: ${p} }`,
  },
  complementAtMost: {
    label: '1 - P at most',
    make: (p) => ({ complementAtMost: p }),
    code: (p) => `{ complementAtMost: ${p} }`,
  },
};

/** A number, or the text itself where it is none: the library's message then quotes it. */
function number(text) {
  return text.trim() === '' || Number.isNaN(Number(text)) ? text : Number(text);
}

/** `e^4000`: a number of points by its logarithm. */
const beyondDoubles = /^\s*e\^(\d+(?:\.\d+)?)\s*$/;

function count(text) {
  const power = beyondDoubles.exec(text)?.[1];
  return power ? LogNumber.fromLog(Number(power)) : number(text);
}

/** The field that a parameter of an error belongs to. */
function fieldOf(parameter, question) {
  if (parameter === question.extra?.name) return 'extra';
  if (parameter.startsWith('law.') || parameter === 'b' || parameter === 'degreesOfFreedom') {
    return 'shape';
  }
  if (parameter.startsWith('target') || parameter === 'log') return 'target';
  return ['n', 'd', 'law'].includes(parameter) ? parameter : 'form';
}

/**
 * Answers the fields.
 *
 * @returns `errors` by field; where there are none, `probability` at n and `answer`, the smallest n;
 *   `args` are the arguments besides n, `code` the same as a program
 */
export function answerTo(fields) {
  const question = questions.find(({ ask }) => ask.name === fields.question);
  const errors = {};
  const attempt = (body) => {
    try {
      return body();
    } catch (error) {
      const known = error.code === 'HULLGAUGE_DOMAIN';
      errors[known ? fieldOf(error.parameter, question) : 'form'] ??= error.message;
      return undefined;
    }
  };
  const args = { d: number(fields.d) };
  if (question.law) {
    const { make } = laws[fields.law];
    args.law = attempt(() => make(number(fields.shape)));
  }
  if (question.extra) args[question.extra.name] = number(fields.extra);
  const n = count(fields.n);
  if (errors.shape) {
    // Any law will do to find out whether the other fields are in order.
    attempt(() => question.ask({ ...args, n, law: uniformBall() }));
    attempt(() => question.ask({ ...args, n: 1, law: uniformBall() }));
    return { question, errors };
  }
  const probability = attempt(() => question.ask({ ...args, n }));
  const answer = attempt(() =>
    smallest(question.ask, 'n', args, forms[fields.form].make(number(fields.target))),
  );
  return { question, errors, args, n, probability, answer, code: codeFor(question, fields) };
}

/** The program that gives the same numbers. */
function codeFor({ ask, law, extra }, { n, d, law: lawName, shape, extra: value, form, target }) {
  const names = [ask.name, 'smallest'];
  const args = [`d: ${d}`];
  if (law) {
    const inside = { b: shape, degreesOfFreedom: `{ degreesOfFreedom: ${shape} }` };
    args.push(`law: ${lawName}(${inside[laws[lawName].shape] ?? ''})`);
    names.push(lawName);
  }
  if (extra) args.push(`${extra.name}: ${value}`);
  if (form === 'logAtLeast') names.push('Probability');
  const power = beyondDoubles.exec(n)?.[1];
  if (power) names.push('LogNumber');
  return `import { ${names.sort((a, b) => a.localeCompare(b)).join(', ')} } from 'hullgauge';

const args = { ${args.join(', ')} };
${ask.name}({ n: ${power ? `LogNumber.fromLog(${power})` : n}, ...args });
smallest(${ask.name}, 'n', args, ${forms[form].code(target)});
`;
}
