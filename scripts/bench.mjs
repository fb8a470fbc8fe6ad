/** npm run bench: the measurements of scripts/bench one after another, and their table. Arguments choose files by a part of their name. */
import { readdirSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import process from 'node:process'
import { pathToFileURL } from 'node:url'
import { ensureChromium, ensurePackages } from './lib/install.mjs'
import { command } from './lib/lifetime.mjs'
import { inRoot, root } from './lib/places.mjs'
import { Refusal, say } from './lib/say.mjs'
import { startStack, testFolder } from './lib/stack.mjs'

/**
 * @typedef {import('./bench/measure').Measure} Measure
 * @typedef {import('./bench/measure').Row} Row
 */

await command(async (lifetime) => {
  await ensurePackages(lifetime)
  const wanted = process.argv.slice(2)
  const names = readdirSync(inRoot('scripts', 'bench'))
    .filter(name => name.endsWith('.ts') && name !== 'measure.ts')
    .filter(name => wanted.length === 0 || wanted.some(part => name.includes(part)))
    .map(name => name.slice(0, -'.ts'.length))
  if (names.length === 0) throw new Refusal(`No measurement in scripts/bench is named like ${wanted.join(' or ')}.`)

  /** @type {Row[]} */
  const rows = []
  for (const measure of inOrder(await load(lifetime, names))) {
    say(`Measuring: ${measure.title} …`)
    rows.push(...await runOne(lifetime, measure))
  }
  say(`\n${table(rows)}`)
  await lifetime.end(0)
})

/**
 * Bundles the measurements, as they would run in the product: plain code without a test runner's wrapping.
 * @param {import('./lib/lifetime.mjs').Lifetime} lifetime
 * @param {string[]} names
 * @returns {Promise<Measure[]>}
 */
async function load(lifetime, names) {
  const { build } = await import('vite')
  const folder = join(testFolder, `bundle-${process.pid}`)
  lifetime.closing(() => rmSync(folder, { recursive: true, force: true }))
  await build({
    configFile: false,
    root,
    logLevel: 'error',
    resolve: { alias: { '#shared': inRoot('shared') } },
    // Given here, so that Nuxt's generated ones need not exist.
    esbuild: { tsconfigRaw: '{}' },
    build: {
      ssr: true,
      target: 'node20',
      outDir: folder,
      copyPublicDir: false,
      rollupOptions: {
        input: Object.fromEntries(names.map(name => [name, inRoot('scripts', 'bench', `${name}.ts`)])),
        output: { entryFileNames: '[name].mjs' },
      },
    },
  })
  return Promise.all(names.map(async name => (await import(pathToFileURL(join(folder, `${name}.mjs`)).href)).default))
}

/**
 * @param {import('./lib/lifetime.mjs').Lifetime} lifetime
 * @param {Measure} measure
 * @returns {Promise<Row[]>}
 */
async function runOne(lifetime, measure) {
  if (measure.needs === 'core') return measure.run()
  const chromium = measure.needs === 'browser' ? await ensureChromium(lifetime) : ''
  const stack = await startStack('bench', measure.needs)
  const forget = lifetime.closing(stack.close)
  try {
    return await measure.run({ ...stack, chromium })
  } finally {
    forget()
    await stack.close()
  }
}

/**
 * @param {Measure[]} measures
 * @returns {Measure[]} quick and undisturbed ones first
 */
function inOrder(measures) {
  const needs = ['core', 'server', 'browser']
  return measures.toSorted((a, b) => needs.indexOf(a.needs) - needs.indexOf(b.needs))
}

/**
 * @param {Row[]} rows
 * @returns {string}
 */
function table(rows) {
  const lines = [['what', 'figure', 'unit', 'target', ''], ...rows.map(({ what, figure, unit, target }) => [
    what, text(figure), unit, target === null ? '' : `< ${text(target)}`, target === null ? '' : figure < target ? 'met' : 'missed',
  ])]
  const widths = [0, 1, 2, 3].map(column => Math.max(...lines.map(line => line[column]?.length ?? 0)))
  const padded = lines.map(line => line.map((cell, column) => column === 1 || column === 3 ? cell.padStart(widths[column] ?? 0) : cell.padEnd(widths[column] ?? 0)).join('  ').trimEnd())
  return [padded[0], widths.map(width => '-'.repeat(width)).join('  '), ...padded.slice(1)].join('\n')
}

/**
 * @param {number} figure
 * @returns {string}
 */
function text(figure) {
  return figure.toLocaleString('en-GB', { maximumSignificantDigits: 4 })
}
