import { join } from 'node:path'
import AxeBuilder from '@axe-core/playwright'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { Mapping } from '@shared/contracts/mapping'
import { repository } from '../../server/start/repository.mjs'
import { type RunningServer, startServer } from '../../server/start/server-process.mjs'
import { lassoAround, pathOf, paintAlong } from '../support/board-hand'
import { focusByTab, walkTo } from '../support/board-keys'
import { launchBrowser, openPage, type OpenedPage } from '../support/browser'
import { createDatabase, type TestDatabase } from '../support/databases'
import { outputFolder } from '../support/output-folder'
import { cleanEnvironment } from '../support/server-environment'

/**
 * Poly(butylene succinate): O1, C1 to C4, O2, C5 with its O3, C6, C7, C8 with its O4. The terms were worked out by hand.
 */
const SMILES = '*OCCCCOC(=O)CCC(*)=O'
/** A the diol, B the acid: the chain runs A–B–A–B, so each kind of row is counted once. */
const COARSE_TERMS = ['bond A–B', 'angle A–B–A', 'angle B–A–B', 'dihedral A–B–A–B']
/** A butylene, B and D the esters, D over the border, C what is between them: the chain runs A–B–C–D–A, four rows of each kind. */
const FINE_TERMS = [
  ...['bond A–B', 'bond A–D', 'bond B–C', 'bond C–D'],
  ...['angle A–B–C', 'angle B–A–D', 'angle A–D–C', 'angle B–C–D'],
  ...['dihedral A–B–C–D', 'dihedral A–D–C–B', 'dihedral B–A–D–C', 'dihedral C–B–A–D'],
]

describe('the mapping board, for a new polymer', () => {
  let browser: Browser
  let database: TestDatabase
  let server: RunningServer
  let opened: OpenedPage
  let page: Page

  beforeAll(async () => {
    database = await createDatabase(inject('databaseUrl'), null)
    server = await startServer({
      root: repository,
      logFile: join(outputFolder, 'mapping-board-server.log'),
      env: cleanEnvironment({ NODE_ENV: 'production', PORT: '0', DATABASE_URL: database.url, DEMO: 'off' }),
    })
    browser = await launchBrowser()
    opened = await openPage(browser, { baseUrl: `http://127.0.0.1:${server.port}` })
    page = opened.page
    if (server.setUpPath === null) throw new Error('An empty database offers a set-up link.')
    await page.goto(server.setUpPath)
    await page.getByLabel('Name of the group').fill('Polyesters')
    await page.getByLabel('Your name').fill('Noor de Wit')
    await page.getByLabel('E-mail').fill('noor@example.org')
    await page.getByLabel('Password').fill('a sentence nobody guesses')
    await page.getByRole('button', { name: 'Set up the group' }).click()
    await page.getByRole('heading', { name: 'Polyesters' }).waitFor()
    await page.getByRole('link', { name: 'New polymer' }).first().click()
    await page.getByLabel('Name', { exact: true }).fill('poly(butylene succinate)')
    await page.getByLabel('Repeat unit, SMILES with two *').fill(SMILES)
    await page.getByText('172.180').waitFor()
    await page.getByRole('button', { name: 'Add polymer' }).click()
    await page.getByRole('heading', { name: 'poly(butylene succinate)' }).waitFor()
  })

  afterAll(async () => {
    await browser?.close()
    await server?.stop()
    await database?.drop()
  })

  const saved = () => page.getByText('Saved', { exact: true }).waitFor()
  const everyAtomHeld = () =>
    page
      .getByText(/ in no bead$/)
      .first()
      .waitFor({ state: 'detached' })
  const atom = (label: string) => page.getByRole('button', { name: new RegExp(`^${label}, in `) })
  const shownTerms = async (): Promise<string[]> =>
    page.locator('[data-term]').evaluateAll((rows) => rows.map((row) => row.getAttribute('data-term') ?? ''))
  const openNew = async (name: string): Promise<void> => {
    await page.getByRole('button', { name: 'New mapping' }).click()
    await page.getByLabel('Name', { exact: true }).fill(name)
    await page.getByRole('button', { name: 'Start painting' }).click()
    await page.getByText('No beads yet').waitFor()
  }
  const leave = async (): Promise<void> => {
    await saved()
    await page.goto(new URL(page.url()).pathname.replace(/\/mappings\/.*/, ''))
    await page.getByRole('heading', { name: 'poly(butylene succinate)' }).waitFor()
  }
  const stored = async (name: string): Promise<Mapping> => {
    const polymerId = /polymers\/([^/]+)/.exec(page.url())?.[1] ?? ''
    const answer = await page.request.get(`/api/polymers/${polymerId}/mappings`)
    const { mappings } = (await answer.json()) as { mappings: Mapping[] }
    const found = mappings.find((mapping) => mapping.name === name)
    if (!found) throw new Error(`No mapping is called ${name}.`)
    return found
  }
  /** What a mapping is but for the ids of its beads. */
  const beadsOf = async (name: string) =>
    (await stored(name)).document.beads.map((bead) => ({ ...bead, id: '' }))

  it('takes a coarse mapping by the mouse: a click, a drag, a lasso and a shared atom', async () => {
    await openNew('2-to-1')
    await atom('O1').click()
    await paintAlong(page, await pathOf(page, ['C1', 'C2', 'C3', 'C4']))
    await atom('O2').click()
    await page.getByRole('button', { name: 'New bead' }).click()
    await lassoAround(page, await pathOf(page, ['C5', 'O3', 'C6', 'C7', 'C8', 'O4']))
    await everyAtomHeld()
    await page.getByRole('button', { name: 'Share', exact: true }).click()
    await atom('O2').click()
    await page.getByText(/^O2 × 0.5, C5/).waitFor()
    await page.getByRole('button', { name: 'Share', exact: true }).click()
    await saved()
    expect((await shownTerms()).toSorted()).toEqual(COARSE_TERMS.toSorted())
    const [diol, acid] = await beadsOf('2-to-1')
    expect(diol.atoms.map((held) => held.atom)).toEqual([0, 1, 2, 3, 4, 5])
    expect(acid.atoms.map((held) => held.atom)).toEqual([5, 6, 7, 8, 9, 10, 11])
    expect([diol.atoms[5].weight, acid.atoms[0].weight]).toEqual([0.5, 0.5])
    await leave()
  })

  it('takes a fine mapping by the mouse, with a bead across the border and a site rule', async () => {
    await openNew('4-to-1')
    await paintAlong(page, await pathOf(page, ['C1', 'C2', 'C3', 'C4']))
    await page.locator('.bead-editor .v-field').click()
    await page.getByRole('option', { name: 'geometric centre' }).click()
    await page.getByRole('cell', { name: 'geometric centre', exact: true }).waitFor()
    await page.getByRole('button', { name: 'New bead' }).click()
    for (const label of ['O2', 'C5', 'O3']) await atom(label).click()
    await page.getByRole('button', { name: 'New bead' }).click()
    await lassoAround(page, await pathOf(page, ['C6', 'C7']))
    await page.getByRole('button', { name: 'New bead' }).click()
    await paintAlong(page, await pathOf(page, ['C8', 'O4']))
    await page.getByRole('button', { name: /^O1 of the next unit, in / }).click()
    await everyAtomHeld()
    await saved()
    expect((await shownTerms()).toSorted()).toEqual(FINE_TERMS.toSorted())
    expect((await beadsOf('4-to-1')).map(({ atoms }) => atoms.map((held) => [held.atom, held.unit]))).toEqual(
      [
        [1, 2, 3, 4].map((each) => [each, 0]),
        [5, 6, 7].map((each) => [each, 0]),
        [8, 9].map((each) => [each, 0]),
        [...[10, 11].map((each) => [each, 0]), [0, 1]],
      ],
    )
  })

  it('is accessible with a painted mapping', async () => {
    const { violations } = await new AxeBuilder({ page })
      .withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa'])
      .analyze()
    expect(violations.map(({ id }) => id)).toEqual([])
    expect(await opened.picture('board-painted')).toBeTruthy()
    await leave()
  })

  it('takes the fine mapping again by the keyboard alone', async () => {
    await openNew('4-to-1 by keys')
    await focusByTab(page, '[data-atom]')
    const paint = async (labels: readonly string[]): Promise<void> => {
      for (const label of labels) {
        await walkTo(page, label)
        await page.keyboard.press('Space')
      }
    }
    const addBead = async (): Promise<void> => {
      await focusByTab(page, '[aria-label="New bead"]', 'Shift+Tab')
      await page.keyboard.press('Enter')
      await focusByTab(page, '[data-atom]')
    }
    await paint(['C1', 'C2', 'C3', 'C4'])
    await focusByTab(page, '.bead-editor [role=combobox]')
    await page.keyboard.press('ArrowDown')
    const option = page.getByRole('option', { name: 'geometric centre' })
    await option.waitFor()
    for (let step = 0; step < 3 && !(await option.evaluate(hasFocus)); step++) {
      await page.keyboard.press('ArrowDown')
    }
    await page.keyboard.press('Enter')
    await page.getByRole('cell', { name: 'geometric centre', exact: true }).waitFor()
    await addBead()
    await addBead()
    await addBead()
    // Digits and letters take a bead; the atoms may come in any order.
    await page.keyboard.press('3')
    await paint(['C6', 'C7'])
    await page.keyboard.press('b')
    await paint(['O2', 'C5', 'O3'])
    await page.keyboard.press('d')
    await paint(['C8', 'O4', 'O1 of the next unit'])
    await page.keyboard.press('z')
    await page.getByText('O1 is in no bead').waitFor()
    await page.keyboard.press('Shift+Z')
    await everyAtomHeld()
    await saved()
    expect((await shownTerms()).toSorted()).toEqual(FINE_TERMS.toSorted())
    expect(await beadsOf('4-to-1 by keys')).toEqual(await beadsOf('4-to-1'))
  })

  it('shows the same after a reload', async () => {
    const masses = () => page.locator('.board__notes table td.number').allInnerTexts()
    const before = await masses()
    await page.reload()
    await saved()
    expect((await shownTerms()).toSorted()).toEqual(FINE_TERMS.toSorted())
    expect(await masses()).toEqual(before)
    expect(await beadsOf('4-to-1 by keys')).toEqual(await beadsOf('4-to-1'))
  })

  it('never complained and asked no other host', () => {
    expect(opened.complaints).toEqual([])
  })
})

/** Runs in the page. */
const hasFocus = (element: Element): boolean => element === document.activeElement
