import { createHash } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { strFromU8, unzipSync } from 'fflate'
import type { Browser, Download, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { repository } from '../../server/start/repository.mjs'
import { type RunningServer, startServer } from '../../server/start/server-process.mjs'
import {
  type AnalyticTerm,
  equalEdges,
  expectedCounts,
  largestDeviation,
  tableRowsOf,
} from '../support/analytic-files'
import { launchBrowser, openPage, type OpenedPage } from '../support/browser'
import { createDatabase, type TestDatabase } from '../support/databases'
import { outputFolder } from '../support/output-folder'
import { printedParameters } from '../support/printed-parameters'
import { cleanEnvironment } from '../support/server-environment'

const TEMPERATURE = 420
const KT = 8.31446261815324e-3 * TEMPERATURE
const DEGREE = Math.PI / 180

const BOND: AnalyticTerm = {
  energy: (r) => 4000 * (r - 0.29) ** 2 - 9000 * (r - 0.29) ** 3,
  jacobian: (r) => r * r,
}
/** Two wells; some angles are straight. */
const ANGLE: AnalyticTerm = {
  energy: (theta) => 22 * (theta - 2.2) ** 2 + 3 * Math.cos(4 * theta),
  jacobian: Math.sin,
}
const DIHEDRAL: AnalyticTerm = {
  energy: (phi) => 3 * (1 + Math.cos(3 * phi)) + 2.5 * (1 + Math.cos(phi)),
  jacobian: () => 1,
}

const BOND_EDGES = equalEdges(0.2, 0.4, 100)
const ANGLE_EDGES = equalEdges(60 * DEGREE, 180 * DEGREE, 60)
const DIHEDRAL_EDGES = equalEdges(-Math.PI, Math.PI, 120)
const TOTAL = 1e6

/** Each file in a dialect of its own. */
function files(): { name: string; mimeType: string; buffer: Buffer }[] {
  const bond = expectedCounts(BOND, KT, BOND_EDGES, TOTAL).map(
    (count, bin) => `${(BOND_EDGES[bin] * 10).toFixed(3)},${(BOND_EDGES[bin + 1] * 10).toFixed(3)},${count}`,
  )
  const angle = expectedCounts(ANGLE, KT, ANGLE_EDGES, TOTAL).map(
    (count, bin) => `${((ANGLE_EDGES[bin] + ANGLE_EDGES[bin + 1]) / 2 / DEGREE).toFixed(1)}\t${count}`,
  )
  const dihedral = expectedCounts(DIHEDRAL, KT, DIHEDRAL_EDGES, TOTAL).map(
    (count, bin) => `${(DIHEDRAL_EDGES[bin] / DEGREE + 1.5).toFixed(1)} ${count}`,
  )
  const [bonds, angles] = [equalEdges(0.22, 0.38, 20), equalEdges(70 * DEGREE, 180 * DEGREE, 22)]
  const bondCounts = expectedCounts(BOND, KT, bonds, 1)
  const angleCounts = expectedCounts(ANGLE, KT, angles, 20_000)
  const joint = bondCounts.flatMap((share, x) =>
    angleCounts.map((count, y) => {
      const [r, theta] = [(bonds[x] + bonds[x + 1]) / 2, (angles[y] + angles[y + 1]) / 2]
      return `${r.toFixed(4)};${(theta / DEGREE).toFixed(2)};${share * count}`
    }),
  )
  const asFile = (name: string, lines: readonly string[]) => ({
    name,
    mimeType: 'text/plain',
    buffer: Buffer.from(`${lines.join('\n')}\n`),
  })
  return [
    asFile('bond V-V 420K.csv', ['low_A,high_A,count', ...bond]),
    asFile('angle V-V-V.txt', ['# expected counts', '; centre in degrees', ...angle]),
    asFile('dihedral V-V-V-V.dat', ['@ degrees', ...dihedral]),
    asFile('V-V_V-V-V.txt', ['r;theta;count', ...joint]),
  ]
}

describe('the main job, for a polymer of one’s own', () => {
  let browser: Browser
  let database: TestDatabase
  let server: RunningServer
  let opened: OpenedPage
  let page: Page

  beforeAll(async () => {
    database = await createDatabase(inject('databaseUrl'), null)
    server = await startServer({
      root: repository,
      logFile: join(outputFolder, 'main-job-server.log'),
      env: cleanEnvironment({ NODE_ENV: 'production', PORT: '0', DATABASE_URL: database.url, DEMO: 'off' }),
    })
    browser = await launchBrowser()
    opened = await openPage(browser, { baseUrl: `http://127.0.0.1:${server.port}` })
    page = opened.page
  })

  afterAll(async () => {
    await browser?.close()
    await server?.stop()
    await database?.drop()
  })

  it('starts with the set-up link, which works once', async () => {
    if (server.setUpPath === null) throw new Error('An empty database offers a set-up link.')
    await page.goto(server.setUpPath)
    await page.getByLabel('Name of the group').fill('Coatings')
    await page.getByLabel('Your name').fill('Ines Marchetti')
    await page.getByLabel('E-mail').fill('ines@example.org')
    await page.getByLabel('Password').fill('a sentence nobody guesses')
    await page.getByRole('button', { name: 'Set up the group' }).click()
    await page.getByRole('heading', { name: 'Coatings' }).waitFor()
    await page.goto(server.setUpPath)
    await page.getByText('This link does not work any more').waitFor()
  })

  it('signs out and in again with e-mail and password', async () => {
    await page.goto('/')
    await page.getByRole('button', { name: 'Ines Marchetti' }).click()
    await page.getByText('Sign out').click()
    await page.getByRole('heading', { name: 'Sign in' }).waitFor()
    await page.getByLabel('E-mail').fill('ines@example.org')
    await page.getByLabel('Password').fill('a sentence nobody guesses')
    await page.getByRole('button', { name: 'Sign in' }).click()
    await page.getByRole('heading', { name: 'Coatings' }).waitFor()
  })

  it('draws the repeat unit and refuses one that is none, with its place', async () => {
    await page.getByRole('link', { name: 'New polymer' }).first().click()
    await page.getByLabel('Name', { exact: true }).fill('poly(vinyl acetate)')
    const smiles = page.getByLabel('Repeat unit, SMILES with two *')
    await smiles.fill('*CC(OC(C)=O')
    await page
      .getByText(/SMILES/)
      .last()
      .waitFor()
    await smiles.fill('*CC(*)OC(C)=O')
    await page.getByText('86.090').waitFor()
    await page.getByRole('button', { name: 'Add polymer' }).click()
    await page.getByRole('heading', { name: 'poly(vinyl acetate)' }).waitFor()
  })

  it('adds a state point', async () => {
    await page.getByRole('button', { name: 'Add state point' }).first().click()
    await page.getByLabel('Temperature').fill(String(TEMPERATURE))
    await page.getByLabel('Phase').fill('melt')
    await page.getByRole('button', { name: 'Add state point' }).last().click()
    await page.getByRole('cell', { name: '420 K', exact: true }).waitFor()
  })

  it('paints two beads and sees the terms that follow', async () => {
    await page.getByRole('button', { name: 'New mapping' }).click()
    await page.getByLabel('Name', { exact: true }).fill('2-to-1')
    await page.getByRole('button', { name: 'Start painting' }).click()
    await paint(page)
    expect(await opened.picture('job-mapping')).toBeTruthy()
  })

  it('reads four files of four dialects and stores them', async () => {
    await enter(page, 'Intake')
    await page.locator('#intake-files').setInputFiles(files())
    const waiting = page.getByRole('list', { name: 'Files not stored yet' }).getByRole('listitem')
    for (let left = 4; left > 0; left--) {
      expect(await waiting.count()).toBe(left)
      const current = await waiting.locator('[aria-current] .mono').innerText()
      await page.getByRole('button', { name: /^Store / }).click()
      await page.getByText(`${current} stored for`).waitFor()
    }
    expect(await waiting.count()).toBe(0)
    expect(await opened.picture('job-intake')).toBeTruthy()
  })

  it.each(['V–V', 'V–V–V', 'V–V–V–V'])('inverts %s on the bench and saves the potential', async (name) => {
    await enter(page, 'Bench')
    await termRow(page, name).click()
    await page.getByRole('heading', { name, exact: true }).waitFor()
    await page.getByRole('button', { name: 'Save potential' }).click()
    await page.getByText('revision 1 saved').waitFor()
    expect(await opened.picture(`job-bench-${name.length}`)).toBeTruthy()
  })

  it('exports the figure of the bench as a picture and as numbers', async () => {
    const exported = (format: string) =>
      downloaded(page.waitForEvent('download'), async () => {
        await page.getByRole('button', { name: 'Export figure' }).click()
        await page.getByRole('menuitem', { name: format }).click()
      })
    const svg = Buffer.from(await exported('SVG')).toString('utf8')
    expect(svg).toContain('poly(vinyl acetate), 2-to-1: dihedral V–V–V–V at 420 K, melt.')
    expect(await page.evaluate(rootOf, svg)).toBe('svg')
    const png = Buffer.from(await exported('PNG'))
    expect(png.subarray(0, 8).toString('hex')).toBe('89504e470d0a1a0a')
    // Width and height stand in the first chunk: twice those of the SVG.
    expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual(
      ['width', 'height'].map((side) => 2 * Number(new RegExp(`^<svg [^>]*${side}="(\\d+)"`).exec(svg)?.[1])),
    )
    const csv = Buffer.from(await exported('CSV')).toString('utf8')
    expect(csv).toMatch(/^phi low \(deg\),phi high \(deg\),share,p measured \(%\/deg\),/m)
  })

  it('writes the table of the form that was chosen, row by row its formula with the printed parameters', async () => {
    await termRow(page, 'V–V–V').click()
    await page.getByRole('heading', { name: 'V–V–V', exact: true }).waitFor()
    await page.getByRole('radio', { name: 'harmonic', exact: true }).check()
    await page.getByText('The table is written from this form').waitFor()
    expect(await opened.picture('job-bench-form')).toBeTruthy()
    await page.getByRole('button', { name: 'Save potential' }).click()
    await page.getByText('revision 2 saved').waitFor()
    const text = Buffer.from(
      await downloaded(page.waitForEvent('download'), () =>
        page.getByRole('link', { name: 'Download', exact: true }).click(),
      ),
    ).toString('utf8')
    const parameters = printedParameters(text)
    const rows = tableRowsOf(text)
    expect(rows.length).toBe(1000)
    for (const [theta, energy] of rows) {
      const form = 0.5 * parameters['k'] * (theta - parameters['theta0']) ** 2
      // Parameters and rows are printed to seven digits, the energy doubles the relative error of θ − θ0.
      expect(Math.abs(energy - form)).toBeLessThan(1e-4 + 1e-6 * form)
    }
    await page.getByRole('radio', { name: 'table' }).check()
    await page.getByRole('button', { name: 'Save potential' }).click()
    await page.getByText('revision 3 saved').waitFor()
  })

  it('judges the bond–angle map separable and records the decision', async () => {
    await enter(page, 'Correlation')
    await page.getByRole('heading', { name: 'Separable' }).waitFor()
    await page.getByLabel('Two tables, one by one').check()
    await page.getByLabel('Reason, kept on record').fill('The product reproduces the map.')
    await page.getByRole('button', { name: 'Record decision' }).click()
    await page.getByText('The product reproduces the map.').waitFor()
    expect(await opened.picture('job-correlation')).toBeTruthy()
  })

  it('downloads tables that are the analytic potentials within 0.05 kT', async () => {
    await enter(page, 'Tables')
    const archive = unzipSync(
      await downloaded(page.waitForEvent('download'), () =>
        page.getByRole('link', { name: 'Download all' }).click(),
      ),
    )
    const names = Object.keys(archive)
    expect(names.some((name) => /readme/i.test(name))).toBe(true)
    for (const [kind, term, scale] of [
      ['bond', BOND, 1],
      ['angle', ANGLE, DEGREE],
      ['dihedral', DIHEDRAL, DEGREE],
    ] as const) {
      const name = names.find((each) => each.includes(`${kind}_V-V`)) ?? ''
      const text = strFromU8(archive[name])
      const rows = tableRowsOf(text).map(([coordinate, energy]) => [coordinate * scale, energy] as const)
      const { deviation, rows: judged } = largestDeviation(term, KT, rows)
      expect(judged).toBeGreaterThan(200)
      expect(deviation, kind).toBeLessThan(0.05)
      const stated = /^# rows: SHA-256 ([0-9a-f]{64})$/m.exec(text)?.[1]
      const body = text.split('\n').filter((line) => line !== '' && !line.startsWith('#'))
      expect(
        createHash('sha256')
          .update(`${body.join('\n')}\n`)
          .digest('hex'),
      ).toBe(stated)
    }
  })

  it('shows on the bench the numbers that are in the file', async () => {
    await page.getByRole('link', { name: /^Download bond/ }).waitFor()
    const text = Buffer.from(
      await downloaded(page.waitForEvent('download'), () =>
        page.getByRole('link', { name: /^Download bond/ }).click(),
      ),
    ).toString('utf8')
    const written = tableRowsOf(text).map((row) => row.join(' '))
    await enter(page, 'Bench')
    await termRow(page, 'V–V').click()
    const rows = page.getByRole('table', { name: 'Rows of the table' }).locator('tbody tr')
    await rows.last().waitFor()
    const shown = (await rows.all()).map(async (row) =>
      (await row.getByRole('cell').allInnerTexts()).map((cell) => Number(cell.replace('−', '-'))).join(' '),
    )
    expect(shown.length).toBeGreaterThan(5)
    for (const row of await Promise.all(shown)) expect(written).toContain(row)
  })

  it('never complained and asked no other host', () => {
    expect(opened.complaints).toEqual([])
  })
})

/** Goes to a room and waits until it is there. */
async function enter(page: Page, room: string): Promise<void> {
  await page.getByRole('link', { name: room, exact: true }).click()
  await page.locator('nav a[aria-current=page]', { hasText: room }).waitFor()
}

/** The row of a term in the rail; its name ends where the standing begins. */
function termRow(page: Page, name: string) {
  return page.locator('[data-term]').filter({ has: page.getByText(name, { exact: true }) })
}

/** V takes the two backbone carbons by clicks, A the acetate by a drag and by keys. */
async function paint(page: Page): Promise<void> {
  const atom = (label: string) => page.getByRole('button', { name: new RegExp(`^${label}, in `) })
  await atom('C1').click()
  await atom('C2').click()
  await page.getByText('O1, C3, C4 and O2 are in no bead').waitFor()
  await page.getByLabel('Letters').fill('V')
  await page.getByLabel('Type').fill('V')
  await page.getByLabel('Type').press('Tab')
  await page.getByRole('button', { name: 'Bead V', exact: true }).waitFor()

  await page.getByRole('button', { name: 'New bead' }).click()
  const [from, to] = [await atom('O1').boundingBox(), await atom('C3').boundingBox()]
  if (from === null || to === null) throw new Error('The atoms are drawn.')
  const centre = (box: typeof from) => [box.x + box.width / 2, box.y + box.height / 2] as const
  await page.mouse.move(...centre(from))
  await page.mouse.down()
  await page.mouse.move(...centre(to), { steps: 8 })
  await page.mouse.up()
  await page.getByText('C4 and O2 are in no bead').waitFor()
  for (const label of ['C4', 'O2']) {
    await atom(label).focus()
    await page.keyboard.press('Space')
  }
  await page.keyboard.press('z')
  await page.getByText('O2 is in no bead').waitFor()
  await page.keyboard.press('Shift+z')
  await page.getByText('is in no bead').waitFor({ state: 'detached' })
  await page.getByRole('heading', { name: 'Terms that follow, 7' }).waitFor()
  await page.getByText('Saved', { exact: true }).waitFor()
}

/** The root of a document read as XML, which takes no error: "svg", or what says what is wrong. Runs in the page. */
const rootOf = (text: string): string => {
  const document = new DOMParser().parseFromString(text, 'image/svg+xml')
  return document.querySelector('parsererror')?.textContent ?? document.documentElement.localName
}

async function downloaded(waiting: Promise<Download>, act: () => Promise<void>): Promise<Uint8Array> {
  await act()
  return readFileSync(await (await waiting).path())
}
