import { randomBytes } from 'node:crypto'
import type { DataSource } from 'typeorm'
import { Setting } from '../entities/setting.entity'

/** What the installation keeps for itself. */
export class SettingService {
  constructor(private readonly dataSource: DataSource) {}

  /** The secret that signs session cookies: made on the first start, the same ever after. */
  async sessionSecret(): Promise<string> {
    const key = 'session-secret'
    const { manager } = this.dataSource
    const value = randomBytes(48).toString('base64url')
    await manager.createQueryBuilder().insert().into(Setting).values({ key, value }).orIgnore().execute()
    const kept = await manager.findOneOrFail(Setting, { where: { key }, select: { key: true, value: true } })
    return kept.value
  }
}
