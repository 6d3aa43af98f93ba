/**
 * The package and the documentation in a real browser: the ESM build loaded without a bundler, the site
 * opened from disk, and the calculator operated by keyboard.
 *
 * Needs `npm run docs` (which builds) and Debian's chromium; CHROMIUM overrides its path.
 */
import assert from 'node:assert/strict';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { originInHull, smallest } from 'hullgauge';
import { chromium } from 'playwright-core';

const root = fileURLToPath(new URL('../..', import.meta.url));
const site = join(root, 'site');
/** The address of a page on disk, with what stands after `#`. */
const page = (name, hash = '') => `${pathToFileURL(join(site, name)).href}${hash}`;

/** The import map that a page without a bundler needs: every entry, and the two dependencies. */
function importMap() {
  const { name, exports } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
  const entries = Object.entries(exports).flatMap(([path, { import: esm }]) =>
    esm ? [[join(name, path), esm.default.slice(1)]] : [],
  );
  const generator = 'pure-rand/generator/xoroshiro128plus';
  return {
    imports: {
      ...Object.fromEntries(entries),
      'decimal.js': '/node_modules/decimal.js/decimal.mjs',
      [generator]: `/node_modules/${generator.replace('/', '/lib/esm/')}.js`,
    },
  };
}

/** Serves the build, the dependencies and one page that holds the import map. */
async function serve() {
  const home = `<!doctype html><link rel="icon" href="data:,"><script type="importmap">${JSON.stringify(importMap())}</script>`;
  const server = createServer(({ url = '' }, response) => {
    const file = join(root, url);
    const module = /^\/(dist|node_modules\/(decimal\.js|pure-rand))\/[\w./-]+\.m?js$/.test(url);
    response.setHeader('content-type', module ? 'text/javascript' : 'text/html');
    response.end(module ? readFileSync(file) : home);
  }).listen(0, '127.0.0.1');
  await new Promise((ready) => server.once('listening', ready));
  return server;
}

/** All links and sources of a page that stay inside the site, as written; icons come by script. */
function internalLinks(html) {
  const attributes = html.matchAll(/<[a-z][^>]*?\s(?:href|src)="([^"]*)"/gi);
  return [...attributes]
    .map(([, target]) => target.replaceAll('&amp;', '&'))
    .filter(
      (target) => target !== '' && !/^(https?:|data:|mailto:|javascript:|#icon-)/.test(target),
    );
}

/** Every link of every page leads to a file, and every fragment to an element. */
function brokenLinks() {
  const files = readdirSync(site, { recursive: true }).filter((name) => name.endsWith('.html'));
  const read = new Map();
  const idsOf = (file) => {
    if (!read.has(file)) {
      const ids = readFileSync(file, 'utf8').matchAll(/\sid="([^"]*)"/g);
      read.set(file, new Set([...ids].map(([, id]) => id)));
    }
    return read.get(file);
  };
  const broken = [];
  for (const name of files) {
    const from = join(site, name);
    for (const link of internalLinks(readFileSync(from, 'utf8'))) {
      const [path, fragment] = decodeURI(link).split('#');
      const file = path === '' ? from : resolve(dirname(from), path.replace(/\?.*/, ''));
      const found =
        existsSync(file) &&
        (!fragment ||
          !file.endsWith('.html') ||
          name === 'calculator.html' ||
          idsOf(file).has(fragment));
      if (!found) broken.push(`${name}: ${link}`);
    }
  }
  assert.ok(files.length > 100, `only ${files.length} pages`);
  return broken;
}

let failed = 0;

/** Runs one check in a tab of its own; errors on the console fail it. */
async function check(browser, name, body) {
  const started = performance.now();
  const tab = await browser.newPage();
  const errors = [];
  tab.on('console', (message) => message.type() === 'error' && errors.push(message.text()));
  tab.on('pageerror', (error) => errors.push(error.message));
  tab.on('requestfailed', (request) => errors.push(`${request.url()} failed`));
  // From disk means from disk: any other request would need a network.
  tab.on('request', (request) => {
    if (/^https?:/.test(request.url()) && !request.url().includes('//127.0.0.1:')) {
      errors.push(`${request.url()} asked for`);
    }
  });
  try {
    await body(tab);
    assert.equal(errors.slice(0, 5).join('\n'), '');
    console.log(`ok   ${name} (${Math.round(performance.now() - started)} ms)`);
  } catch (error) {
    failed++;
    console.error(`FAIL ${name}: ${error.message}`);
  } finally {
    await tab.close();
  }
}

const near = (seen, truth, tolerance = 1e-13) =>
  assert.ok(Math.abs(seen / truth - 1) < tolerance, `${seen} instead of ${truth}`);

/** Opens a page from disk and demands that its pictures are there. */
async function open(tab, name, hash = '') {
  await tab.goto(page(name, hash));
  const pictures = await tab.evaluate(() =>
    [...document.querySelectorAll('main img, .col-content img')].map(({ src, naturalWidth }) => ({
      src,
      naturalWidth,
    })),
  );
  for (const { src, naturalWidth } of pictures) assert.ok(naturalWidth > 0, `${src} is not shown`);
  return pictures.length;
}

/** The message at a field, by the elements that describe the field. */
const messageAt = (tab, field) =>
  tab.evaluate((name) => {
    const input = document.querySelector(`form [name="${name}"]`);
    const described = (input.getAttribute('aria-describedby') ?? '').split(' ');
    return {
      invalid: input.getAttribute('aria-invalid'),
      message: described
        .filter((id) => id.endsWith('-message'))
        .map((id) => document.getElementById(id).textContent)
        .join(''),
    };
  }, field);

const server = await serve();
const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    '--disable-gpu',
    '--disable-quic',
    '--no-first-run',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
  ],
});
try {
  await check(
    browser,
    'the ESM build runs through an import map, without a bundler',
    async (tab) => {
      await tab.goto(`http://127.0.0.1:${server.address().port}/`);
      const entries = Object.keys(importMap().imports).filter((name) =>
        name.startsWith('hullgauge'),
      );
      const seen = await tab.evaluate(async (names) => {
        for (const name of names) await import(name);
        const { nextPointInHull, originInHull, smallest } = await import('hullgauge');
        const { originInHullDecimal } = await import('hullgauge/precise');
        return {
          surrounded: originInHull({ n: 40, d: 12 }).value,
          farTail: originInHull({ n: 4000, d: 3 }).logComplement,
          size: smallest(originInHull, 'n', { d: 20 }, 0.5).value,
          next: nextPointInHull({ n: 3, d: 1 }).value,
          decimal: originInHullDecimal({ n: 10, d: 3, digits: 30 }).toString(),
        };
      }, entries);
      near(seen.surrounded, 0.99526234786018);
      near(seen.farTail, originInHull({ n: 4000, d: 3 }).logComplement);
      near(seen.next, 0.5);
      assert.equal(seen.size, 40);
      assert.equal(seen.decimal, '0.91015625');
    },
  );

  await check(browser, 'no broken link in the site', () => assert.deepEqual(brokenLinks(), []));

  await check(browser, 'start page, guides, accuracy and speed open from disk', async (tab) => {
    await open(tab, 'index.html');
    assert.ok(await tab.getByRole('link', { name: 'Calculator' }).first().isVisible());
    const documents = readdirSync(join(site, 'documents'));
    assert.ok(await tab.evaluate(() => document.querySelector('symbol#icon-search') !== null));
    let pictures = 0;
    for (const name of documents) pictures += await open(tab, join('documents', name));
    const figures = readdirSync(join(root, 'docs/figures')).filter((name) => name.endsWith('.svg'));
    assert.ok(pictures >= figures.length, `${pictures} pictures for ${figures.length} figures`);
    for (const title of ['Accuracy', 'Speed']) {
      assert.ok(documents.includes(`${title}.html`), `no page ${title}`);
    }
  });

  await check(browser, 'no page is wider than a phone', async (tab) => {
    await tab.setViewportSize({ width: 390, height: 844 });
    const documents = readdirSync(join(site, 'documents')).map((name) => join('documents', name));
    const pages = ['index.html', 'calculator.html', 'functions/hullgauge.simplexVolume.html'];
    for (const name of [...pages, ...documents]) {
      await tab.goto(page(name));
      assert.equal(await tab.evaluate(() => document.documentElement.scrollWidth), 390, name);
    }
  });

  await check(
    browser,
    'an API page shows its formula, and search finds a function',
    async (tab) => {
      await open(tab, 'functions/hullgauge.originInHull.html');
      assert.ok((await tab.locator('.katex-html').first().boundingBox()).height > 5);
      await tab.keyboard.press('/');
      await tab.keyboard.type('originInHull');
      const first = tab.locator('#tsd-search-results li').first();
      await first.waitFor();
      assert.match(await first.textContent(), /originInHull/);
    },
  );

  await check(browser, 'the calculator answers by keyboard alone', async (tab) => {
    await open(tab, 'calculator.html');
    await tab.keyboard.press('Tab');
    await tab.keyboard.press('Tab');
    assert.equal(await tab.evaluate(() => document.activeElement.id), 'question');
    await tab.keyboard.press('Tab');
    await tab.keyboard.type('400');
    await tab.keyboard.press('Tab');
    await tab.keyboard.type('20');
    await tab.keyboard.press('Enter');
    const own = originInHull({ n: 400, d: 20 });
    assert.equal(await tab.locator('#headline').textContent(), `P = ${own}`);
    const tails = await tab.locator('#probability dd').allTextContents();
    near(Number(tails[1]), own.complement, 1e-11);
    near(Number(tails[3]), own.logComplement, 1e-11);
    const { value } = smallest(originInHull, 'n', { d: 20 }, 0.99);
    assert.equal(await tab.locator('#smallest').textContent(), `n = ${value}`);
    await tab.locator('#curve svg path.curve').waitFor();
  });

  await check(
    browser,
    'the calculator takes each form of target and every question',
    async (tab) => {
      await open(tab, 'calculator.html', '#question=originInHullLowerBound&extra=0');
      assert.match((await messageAt(tab, 'target')).message, /^smallest: target must be /);
      await tab.locator('#question').selectOption('originInHull');
      const forms = {
        number: '0.9',
        logAtLeast: '-1e-9',
        atMost: '0.5',
        complementAtMost: '1e-12',
      };
      for (const [form, target] of Object.entries(forms)) {
        await tab.locator('#form').selectOption(form);
        await tab.locator('#target').fill(target);
        await tab.keyboard.press('Enter');
        assert.match(await tab.locator('#smallest').textContent(), /^n = \d+$/);
      }
      for (const option of await tab.locator('#question option').all()) {
        await tab.locator('#question').selectOption(await option.getAttribute('value'));
        assert.match(await tab.locator('#headline').textContent(), /^P = /);
        assert.match(await tab.locator('#smallest').textContent(), /^n = /);
        await tab.locator('#curve:not([aria-busy]) svg').waitFor();
        assert.equal(await tab.locator('[aria-invalid]').count(), 0);
      }
    },
  );

  await check(
    browser,
    'a bad argument is named at its field, in the words of the library',
    async (tab) => {
      await open(tab, 'calculator.html');
      const bad = { n: '3.5', d: 'many', target: '2' };
      for (const [field, text] of Object.entries(bad)) {
        const before = await tab.locator(`#${field}`).inputValue();
        await tab.locator(`#${field}`).fill(text);
        await tab.keyboard.press('Enter');
        const { invalid, message } = await messageAt(tab, field);
        assert.equal(invalid, 'true');
        assert.match(message, new RegExp(`: ${field}(\\.\\w+)? must be .*, got "?${text}"?$`));
        await tab.locator(`#${field}`).fill(before);
        await tab.keyboard.press('Enter');
        assert.deepEqual(await messageAt(tab, field), { invalid: null, message: '' });
      }
      await open(tab, 'calculator.html', '#question=nextPointInHull&law=studentT&shape=0&n=x&d=y');
      for (const field of ['n', 'd', 'shape']) {
        assert.equal((await messageAt(tab, field)).invalid, 'true', `${field} beside a bad law`);
      }
      // A link with names that the page does not know leaves it as it begins.
      await open(tab, 'calculator.html', '#question=none&law=none&form=none&action=none');
      assert.match(await tab.locator('#headline').textContent(), /^P = /);
    },
  );
} finally {
  await browser.close();
  server.close();
}
process.exitCode = failed === 0 ? 0 : 1;
