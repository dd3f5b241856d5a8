import type { Locator, Page } from 'playwright-core'
import { launchBrowser, openPage } from '../support/browser'
import { frameScripts, type FrameScript } from '../support/frame-scripts'

/** 60 heavy atoms: rings on the backbone, esters, alkyl links and a side group. */
const SMILES =
  '*Oc1ccc(cc1)C(C)(C)c1ccc(cc1)OC(=O)c1ccc(cc1)C(=O)OCCCCOC(=O)c1cccc(c1)C(=O)OCCC(CC)CCOC(=O)CCCCC(*)=O'
const RUNS = 2
/** Moves of the pointer from one atom to the next. */
const STEPS = 4

/**
 * Prints what script costs in each frame while all atoms of a large repeat unit are painted by one drag: on an empty board, and
 * over six beads that stand. `npm run frames -- URL`, with the address of a Beadwright that runs with the demonstration.
 */
async function study(baseUrl: string): Promise<void> {
  const browser = await launchBrowser()
  try {
    const { page } = await openPage(browser, { baseUrl })
    await page.goto('/sign-in')
    await page.getByRole('button', { name: /modeller/ }).click()
    await page.getByRole('heading', { name: /^Adhesives/ }).waitFor()
    await page.goto('/polymers/new')
    const name = `Frames ${new Date().toISOString()}`
    await page.getByLabel('Name', { exact: true }).fill(name)
    await page.getByLabel('Repeat unit, SMILES with two *').fill(SMILES)
    await page.getByRole('button', { name: 'Add polymer' }).click()
    await page.getByRole('heading', { name }).waitFor()
    await page.getByRole('button', { name: 'New mapping' }).click()
    await page.getByLabel('Name', { exact: true }).fill('frames')
    await page.getByRole('button', { name: 'Start painting' }).click()
    await page.locator('[data-atom]').first().waitFor()
    print('empty board', await runs(page, () => Promise.resolve()))
    print(
      'over six beads',
      await runs(page, async () => {
        await page.getByRole('button', { name: 'Suggest', exact: true }).click()
        await page.getByRole('button', { name: '6 beads', exact: true }).click()
        await page.getByRole('button', { name: 'Accept', exact: true }).click()
        await page.getByRole('button', { name: 'New bead' }).click()
      }),
    )
  } finally {
    await browser.close()
  }
}

/** Paints everything several times; what was painted is taken back in between. */
async function runs(page: Page, prepare: () => Promise<void>): Promise<FrameScript[]> {
  const frames: FrameScript[] = []
  const undo = page.getByRole('button', { name: 'Undo', exact: true })
  for (let run = 0; run <= RUNS; run++) {
    await prepare()
    await page.getByText('Saved', { exact: true }).waitFor()
    const session = await page.context().newCDPSession(page)
    const painted = await frameScripts(session, () => dragOverAll(page))
    await session.detach()
    // The first time the browser still compiles.
    if (run > 0) frames.push(...painted)
    while (await undo.isEnabled()) await undo.click()
  }
  return frames.filter(({ script }) => script > 0.05)
}

async function dragOverAll(page: Page): Promise<void> {
  const atoms = await page.locator('[data-atom]').all()
  const places = await Promise.all(atoms.map(centre))
  await page.mouse.move(places[0].x, places[0].y)
  await page.mouse.down()
  for (const { x, y } of places.slice(1)) await page.mouse.move(x, y, { steps: STEPS })
  await page.mouse.up()
}

async function centre(atom: Locator): Promise<{ x: number; y: number }> {
  const box = await atom.boundingBox()
  if (box === null) throw new Error('An atom is not drawn.')
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 }
}

function print(what: string, frames: readonly FrameScript[]): void {
  const line = (of: keyof FrameScript): string => {
    const sorted = frames.map((frame) => frame[of]).sort((one, other) => one - other)
    const at = (share: number): string =>
      sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))].toFixed(2)
    return `${of} median ${at(0.5)}, p95 ${at(0.95)}, max ${at(1)} ms`
  }
  process.stdout.write(`${what}: ${frames.length} frames; ${line('script')}; ${line('drawing')}\n`)
}

await study(process.argv[2] ?? 'http://127.0.0.1:4310')
