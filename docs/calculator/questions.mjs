/** The questions of the calculator, one row each: what is asked, its fields, and values to begin with. */
import {
  hausdorffWithin,
  hullVolumeRatio,
  labelSeparability,
  logisticFitExists,
  nextPointInHull,
  originInHull,
  originInHullLowerBound,
  pointInHull,
} from 'hullgauge';

/**
 * `extra` names an argument besides n, d and law, with its label. `form` is the target that makes
 * sense: questions whose probability falls with n ask for at most so much.
 */
export const questions = [
  {
    ask: originInHull,
    title: 'Does the sample surround the nominal point?',
    assumes: 'a law symmetric about the point; optimistic for skewed data',
    start: { n: '40', d: '12', target: '0.99' },
  },
  {
    ask: originInHullLowerBound,
    title: 'Does it surround the point, at least, for any law?',
    assumes: 'the half-space depth of the point: the smallest mass of a half-space that holds it',
    extra: { name: 'depth', label: 'Half-space depth' },
    start: { n: '400', d: '12', extra: '0.3', target: '0.99' },
  },
  {
    ask: nextPointInHull,
    title: 'Will the next case interpolate?',
    assumes: 'the next case is drawn like the others',
    law: true,
    start: { n: '200', d: '5', law: 'gaussian', target: '0.9' },
  },
  {
    ask: pointInHull,
    title: 'Will a given query interpolate?',
    assumes: 'a Gaussian sample; the distance is the Mahalanobis distance from the true mean',
    extra: { name: 'mahalanobisDistance', label: 'Mahalanobis distance of the query' },
    start: { n: '200', d: '5', extra: '1.5', target: '0.9' },
  },
  {
    ask: hullVolumeRatio,
    title: 'How much of the ball does the hull fill?',
    assumes: 'points in the unit ball; the expected share of its volume',
    law: true,
    start: { n: '1000', d: '5', law: 'uniformBall', target: '0.5' },
  },
  {
    ask: hausdorffWithin,
    title: 'Is every point of the ball near the hull, at least?',
    assumes:
      'points in the unit ball; a lower bound of P(Hausdorff distance at most the given one)',
    law: true,
    extra: { name: 'distance', label: 'Distance, in radii' },
    start: { n: '1e6', d: '5', law: 'uniformBall', extra: '0.25', target: '0.95' },
  },
  {
    ask: labelSeparability,
    title: 'Would random labels be linearly separable?',
    assumes: 'fair labels, independent of the points; intercept fitted',
    form: 'atMost',
    start: { n: '60', d: '20', target: '0.01' },
  },
  {
    ask: logisticFitExists,
    title: 'Does a logistic fit exist on pure noise?',
    assumes: 'fair labels, independent of the points; intercept fitted',
    start: { n: '60', d: '20', target: '0.99' },
  },
];
