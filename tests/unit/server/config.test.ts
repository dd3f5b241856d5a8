import { describe, expect, it } from 'vitest'
import { ConfigError, readConfig } from '../../../server/config'

const DATABASE_URL = 'postgres://someone@127.0.0.1:5432/beads'

const mistakes = (environment: Record<string, string>): readonly string[] => {
  try {
    readConfig({ DATABASE_URL, ...environment })
    return []
  } catch (error) {
    return (error as ConfigError).sentences
  }
}

describe('readConfig', () => {
  it('needs the database only', () => {
    expect(readConfig({ DATABASE_URL })).toEqual({
      port: 4300,
      host: '127.0.0.1',
      databaseUrl: DATABASE_URL,
      dataFolder: null,
      publicUrl: null,
      smtpUrl: null,
      mailFrom: 'Beadwright <beadwright@localhost>',
      mailCatcher: false,
      worker: true,
      sessionSecret: null,
      demo: false,
      trustedProxies: 0,
      logLevel: 'info',
    })
  })

  it('takes an empty variable as not set', () => {
    expect(readConfig({ DATABASE_URL, PORT: '', DEMO: '', SMTP_URL: '' }).port).toBe(4300)
    expect(() => readConfig({ DATABASE_URL: '' })).toThrow(ConfigError)
  })

  it.each([
    ['PORT', ['-1', '65536', '80.5', 'http', ' 80']],
    ['DATABASE_URL', ['mysql://x/y', 'beads', 'http://localhost']],
    ['SMTP_URL', ['http://mail', 'mail.example.org']],
    ['PUBLIC_URL', ['beads.example.org', 'ftp://beads.example.org']],
    ['MAIL_FROM', ['nobody', 'a@example.org, b@example.org', 'A\r\nBcc: x@example.org <a@example.org>']],
    ['WORKER', ['yes']],
    ['MAIL_CATCHER', ['yes']],
    ['SESSION_SECRET', ['short']],
    ['DEMO', ['yes', 'ON', '1']],
    ['TRUST_PROXY', ['yes', '-1', 'true']],
    ['LOG_LEVEL', ['loud']],
  ])('refuses a wrong %s with a sentence that names it', (name, values) => {
    for (const value of values) {
      const sentences = mistakes({ [name]: value })
      expect([value, sentences.length]).toEqual([value, 1])
      expect(sentences[0]).toContain(name)
    }
  })

  it.each([
    ['HOST', '0.0.0.0'],
    ['SMTP_URL', 'smtp://mail.example.org'],
    ['PUBLIC_URL', 'https://beads.example.org'],
    ['TRUST_PROXY', '1'],
  ])('catches no mail where others than this machine come in or mail goes out: %s', (name, value) => {
    expect(readConfig({ DATABASE_URL, MAIL_CATCHER: 'on' }).mailCatcher).toBe(true)
    const sentences = mistakes({ MAIL_CATCHER: 'on', [name]: value })
    expect(sentences).toHaveLength(1)
    expect(sentences[0]).toContain('MAIL_CATCHER')
  })

  it('reads what is given', () => {
    const config = readConfig({
      DATABASE_URL,
      PORT: '0',
      HOST: '::1',
      DEMO: 'on',
      TRUST_PROXY: '2',
      SMTP_URL: 'smtps://mail.example.org',
      LOG_LEVEL: 'debug',
      DATA_DIR: '/srv/beads',
    })
    expect(config).toMatchObject({ port: 0, host: '::1', demo: true, trustedProxies: 2, logLevel: 'debug' })
  })
})
