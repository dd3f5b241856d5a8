import { describe, expect, it } from 'vitest'
import { localUrl, readSettings } from '../../../../server/start/settings.mjs'

describe('readSettings', () => {
  it('needs nothing', () => {
    expect(readSettings({})).toEqual({
      port: { number: 4300, given: false },
      host: '127.0.0.1',
      databaseUrl: null,
      dataFolder: null,
      demo: 'on',
      mailCatcher: 'on',
    })
  })

  it.each([
    { DATABASE_URL: 'postgres://user@host/name' },
    { SMTP_URL: 'smtp://mail.example.org' },
    { PUBLIC_URL: 'https://beads.example.org' },
    { TRUST_PROXY: '1' },
    { HOST: '0.0.0.0' },
  ])('keeps e-mail on this machine only where it runs alone: not with %o', (environment) => {
    expect(readSettings(environment).mailCatcher).toBe('off')
  })

  it('keeps e-mail on this machine wherever only this machine comes in', () => {
    for (const HOST of ['', 'localhost', '127.0.0.1', '127.1.2.3', '::1']) {
      expect([HOST, readSettings({ HOST, TRUST_PROXY: 'off' }).mailCatcher]).toEqual([HOST, 'on'])
    }
  })

  it('keeps the demo out of a database that was given, unless asked', () => {
    const given = { DATABASE_URL: 'postgres://user@host/name' }
    expect(readSettings(given).demo).toBe('off')
    expect(readSettings({ ...given, DEMO: 'on' }).demo).toBe('on')
  })

  it('knows a port that was asked for from the usual one', () => {
    expect(readSettings({ PORT: '4300' }).port).toEqual({ number: 4300, given: true })
    expect(readSettings({ PORT: '' }).port.given).toBe(false)
  })

  it.each(['65536', '-1', '43.5', '1e3', 'http'])('refuses %s as a port', (PORT) => {
    expect(() => readSettings({ PORT })).toThrow(
      `PORT must be a whole number from 0 to 65535, not "${PORT}".`,
    )
  })

  it('refuses a demo that is neither on nor off', () => {
    expect(() => readSettings({ DEMO: 'yes' })).toThrow('DEMO must be "on" or "off", not "yes".')
  })
})

describe('localUrl', () => {
  it.each([
    ['127.0.0.1', 'http://127.0.0.1:80'],
    ['0.0.0.0', 'http://127.0.0.1:80'],
    ['::', 'http://127.0.0.1:80'],
    ['::1', 'http://[::1]:80'],
    ['10.0.0.7', 'http://10.0.0.7:80'],
  ])('leads to a server that listens on %s by %s', (host, url) => {
    expect(localUrl(host, 80)).toBe(url)
  })
})
