import AxeBuilder from '@axe-core/playwright'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { strFromU8, unzipSync } from 'fflate'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { StoredPotential } from '@shared/contracts/potential'
import type { Session } from '@shared/contracts/session'
import type { CaughtMail } from '@shared/contracts/tray'
import { repository } from '../../server/start/repository.mjs'
import { type RunningServer, startServer } from '../../server/start/server-process.mjs'
import { waitUntil } from '../../server/start/wait-until.mjs'
import { launchBrowser, openPage, type OpenedPage } from '../support/browser'
import { createDatabase, type TestDatabase } from '../support/databases'
import { apiOf, meetChecklist, prepareJob } from '../support/hand-over-job'
import { outputFolder } from '../support/output-folder'
import { cleanEnvironment } from '../support/server-environment'

const PASSWORD = 'a sentence nobody guesses'
const PEOPLE = {
  owner: { name: 'Olga Owner', email: 'olga@example.org' },
  modeller: { name: 'Milo Modeller', email: 'milo@example.org' },
  reviewer: { name: 'Renate Reviewer', email: 'renate@example.org' },
  collaborator: { name: 'Carla Collaborator', email: 'carla@example.org' },
} as const
type Role = keyof typeof PEOPLE
/** Somebody without an account. */
const OUTSIDE = { name: 'Otto Outside', email: 'otto@elsewhere.example' }

describe('a hand-over, from the invitation of its people to the second one', () => {
  let browser: Browser
  let database: TestDatabase
  let server: RunningServer
  let baseUrl: string
  const opened: OpenedPage[] = []

  const newPage = async (options: { width?: number; theme?: 'light' | 'dark' } = {}): Promise<Page> => {
    const each = await openPage(browser, { baseUrl, ...options })
    opened.push(each)
    return each.page
  }
  /** The link of the latest e-mail to an address that leads to a page of that kind, as the catcher received it. */
  const linkTo = async (address: string, kind: 'join' | 'received', after = 0): Promise<string> => {
    const link = await waitUntil(
      async () => {
        const { mails } = (await (await fetch(`${baseUrl}/api/tray`)).json()) as { mails: CaughtMail[] }
        const links = mails
          .filter(({ to }) => to.includes(address))
          .flatMap(({ text }) => new RegExp(`https?://\\S+/${kind}/\\S+`).exec(text) ?? [])
        return links.length > after ? links[0] : null
      },
      { limit: 30_000, interval: 100 },
    )
    if (!link) throw new Error(`No ${kind} link reached ${address}.`)
    return link
  }
  const axe = async (page: Page): Promise<string[]> => {
    const { violations } = await new AxeBuilder({ page })
      .withTags(['wcag2a', 'wcag2aa', 'wcag21aa'])
      .analyze()
    return violations.flatMap(({ id, nodes }) => nodes.map(({ target }) => `${id} at ${target.join(' ')}`))
  }

  beforeAll(async () => {
    database = await createDatabase(inject('databaseUrl'), null)
    server = await startServer({
      root: repository,
      logFile: join(outputFolder, 'hand-over-server.log'),
      env: cleanEnvironment({
        NODE_ENV: 'production',
        PORT: '0',
        DATABASE_URL: database.url,
        DEMO: 'off',
        MAIL_CATCHER: 'on',
      }),
    })
    baseUrl = `http://127.0.0.1:${server.port}`
    browser = await launchBrowser()
  }, 120_000)

  afterAll(async () => {
    await browser?.close()
    await server?.stop()
    await database?.drop()
  })

  it('is played by all four roles and by somebody without an account', { timeout: 240_000 }, async () => {
    // The owner founds the group and invites three people, who follow the links of their e-mails.
    const pages = { owner: await newPage() } as Record<Role, Page>
    const { owner } = pages
    await owner.goto(server.setUpPath ?? '')
    await owner.getByLabel('Name of the group').fill('Coatings')
    await owner.getByLabel('Your name').fill(PEOPLE.owner.name)
    await owner.getByLabel('E-mail').fill(PEOPLE.owner.email)
    await owner.getByLabel('Password').fill(PASSWORD)
    await owner.getByRole('button', { name: 'Set up the group' }).click()
    await owner.getByRole('heading', { name: 'Coatings' }).waitFor()
    const { user } = (await (await owner.request.get('/api/session')).json()) as Session
    const groupId = user?.memberships[0].groupId ?? ''
    await owner.goto(`/groups/${groupId}/invitations`)
    for (const role of ['modeller', 'reviewer', 'collaborator'] as const) {
      await owner.getByLabel('E-mail').fill(PEOPLE[role].email)
      await owner.getByRole('combobox', { name: 'Role' }).press('Enter')
      await owner.getByRole('option', { name: new RegExp(`^${role}`, 'i') }).click()
      await owner.getByRole('button', { name: 'Invite' }).click()
      await owner.getByRole('cell', { name: PEOPLE[role].email, exact: true }).waitFor()
      pages[role] = await newPage()
      await pages[role].goto(await linkTo(PEOPLE[role].email, 'join'))
      await pages[role].getByLabel('Your name').fill(PEOPLE[role].name)
      await pages[role].getByLabel('Password').fill(PASSWORD)
      await pages[role].getByRole('button', { name: 'Join' }).click()
      await pages[role].getByRole('heading', { name: 'Coatings' }).waitFor()
    }
    const { modeller, reviewer, collaborator } = pages
    await collaborator.getByText('Nothing was handed over to you yet').waitFor()

    // The modeller drafts a hand-over and asks for review.
    const api = await apiOf(modeller)
    const job = await prepareJob(api, groupId)
    const draft = async (title: string): Promise<string> => {
      await modeller.goto(`/polymers/${job.polymerId}/hand-overs`)
      await modeller.getByRole('button', { name: 'New hand-over' }).click()
      await modeller.getByLabel('Title').fill(title)
      await modeller.getByRole('button', { name: 'Start' }).click()
      await modeller.getByRole('heading', { name: title }).waitFor()
      const id = modeller.url().split('/').at(-1) ?? ''
      await meetChecklist(api, id)
      await modeller.reload()
      await modeller.getByRole('combobox', { name: 'Reviewer' }).press('Enter')
      await modeller.getByRole('option', { name: PEOPLE.reviewer.name }).click()
      await modeller.getByRole('button', { name: 'Ask for review' }).click()
      await modeller.getByText('in review').first().waitFor()
      return id
    }
    const signOff = async (): Promise<void> => {
      await reviewer.goto('/')
      await reviewer.getByRole('link', { name: `Review asked by ${PEOPLE.modeller.name}` }).click()
      await reviewer.getByRole('button', { name: 'Sign off' }).click()
      await reviewer.getByText('signed off').first().waitFor()
    }
    const release = async (id: string, number: number): Promise<void> => {
      await modeller.goto(`/hand-overs/${id}`)
      await modeller.getByRole('button', { name: 'Release' }).click()
      await modeller.getByRole('heading', { name: `Hand-over ${number}`, exact: true }).waitFor()
    }
    const first = await draft('Melt tables')
    await signOff()
    await release(first, 1)

    // It goes to the collaborator and to somebody without an account.
    for (const person of [PEOPLE.collaborator, OUTSIDE]) {
      await modeller.getByRole('button', { name: 'Send', exact: true }).click()
      const dialog = modeller.getByRole('dialog')
      await dialog.getByLabel('Name').fill(person.name)
      await dialog.getByLabel('E-mail').fill(person.email.replace('@', ' at '))
      await dialog.getByRole('button', { name: 'Send' }).click()
      await dialog.getByText('This does not look like an e-mail address.').waitFor()
      await dialog.getByLabel('E-mail').fill(person.email)
      await dialog.getByRole('button', { name: 'Send' }).click()
      await modeller.getByRole('button', { name: `Send a new link to ${person.email}` }).waitFor()
    }

    // Outside: the link opens the page; the tables are taken, receipt is acknowledged, a question asked.
    const outside = await newPage()
    await outside.goto(await linkTo(OUTSIDE.email, 'received'))
    await outside.getByText('Opened by link, no account needed').waitFor()
    expect(await axe(outside)).toEqual([])
    const taken = async (page: Page): Promise<Record<string, Uint8Array>> => {
      const [download] = await Promise.all([
        page.waitForEvent('download'),
        page.getByRole('link', { name: 'Download all' }).click(),
      ])
      return unzipSync(readFileSync(await download.path()))
    }
    expect(strFromU8((await taken(outside))['SHA256SUMS'])).toContain('bond_A-A_400K.txt')
    await outside.getByRole('combobox', { name: 'Layout of the files' }).press('Enter')
    await outside.getByRole('option', { name: /^JSON/ }).click()
    await outside.getByRole('button', { name: 'First lines of bond_A-A_400K.json' }).waitFor()
    expect(Object.keys(await taken(outside))).toContain('bond_A-A_400K.json')
    await outside.getByRole('button', { name: 'Acknowledge receipt' }).click()
    await outside.getByText(`by ${OUTSIDE.name}.`).waitFor()
    await outside.getByRole('combobox', { name: 'About' }).press('Enter')
    await outside.getByRole('option', { name: 'A–A' }).click()
    await outside.getByLabel('Question', { exact: true }).fill('Does the table start at 0?')
    await outside.getByRole('button', { name: 'Send question' }).click()
    await outside.getByRole('link', { name: '1 question' }).waitFor()

    // The modeller sees all of it and answers; the collaborator reads the answer and not who asked.
    await modeller.goto('/')
    await modeller.getByRole('link', { name: 'Question on A–A' }).click()
    await modeller.getByText(`says ${OUTSIDE.name}`).waitFor()
    await modeller.getByRole('cell', { name: 'JSON', exact: true }).waitFor()
    await modeller.getByRole('button', { name: /^Answer: Does the table/ }).click()
    await modeller.getByLabel('Answer, for every recipient to see').fill('At the first bin with counts.')
    expect(await axe(modeller)).toEqual([])
    await opened.find(({ page }) => page === modeller)?.picture('hand-over-recipients')
    await modeller.getByRole('button', { name: 'Send answer' }).click()
    await modeller.getByText('At the first bin with counts.').waitFor()
    await collaborator.goto('/')
    await collaborator.getByRole('link', { name: 'Hand-over 1, Melt tables' }).click()
    await collaborator.getByText('At the first bin with counts.').waitFor()
    expect(await collaborator.getByText(OUTSIDE.name).count()).toBe(0)

    // A second hand-over with another table goes to both in one step; each page says how they stand to one another.
    const potential = await api.get<StoredPotential>(
      `/api/terms/${job.bondId}/potential?statePoint=${job.statePointId}`,
    )
    await api.send('put', `/api/terms/${job.bondId}/potential`, {
      statePointId: job.statePointId,
      revision: potential.revision,
      settings: { ...potential.settings, jacobian: false },
    })
    const second = await draft('Melt tables, again')
    await signOff()
    await release(second, 2)
    await modeller.getByRole('button', { name: 'Send', exact: true }).click()
    await modeller
      .getByRole('dialog')
      .getByLabel(/^Also to the recipients/)
      .waitFor()
    await modeller.getByRole('dialog').getByRole('button', { name: 'Send' }).click()
    await modeller.getByRole('button', { name: `Send a new link to ${OUTSIDE.email}` }).waitFor()
    await outside.reload()
    await outside.getByText(/replaced by hand-over 2/).waitFor()
    await outside.goto(await linkTo(OUTSIDE.email, 'received', 1))
    await outside.getByRole('heading', { name: 'Changed since hand-over 1' }).waitFor()
    await outside
      .getByText(/Jacobian/)
      .first()
      .waitFor()
    await outside
      .getByText(/largest change|Largest change/)
      .first()
      .waitFor()

    for (const [width, theme] of [
      [1280, 'light'],
      [1280, 'dark'],
      [390, 'light'],
      [390, 'dark'],
    ] as const) {
      const view = await newPage({ width, theme })
      await view.goto(outside.url())
      await view.getByRole('heading', { name: 'Take the tables' }).waitFor()
      expect(await axe(view)).toEqual([])
      const [wide, window] = await view.evaluate(() => [
        document.documentElement.scrollWidth,
        document.documentElement.clientWidth,
      ])
      expect(wide).toBe(window)
      await opened.at(-1)?.picture('received')
    }
    expect(opened.flatMap(({ complaints }) => complaints)).toEqual([])
  })
})
