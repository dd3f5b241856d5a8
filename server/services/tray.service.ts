import type { DataSource } from 'typeorm'
import type { CaughtMail as CaughtMailBody } from '../../shared/contracts/tray'
import { CaughtMail } from '../entities/caught-mail.entity'
import { notFound } from '../errors/http-error'
import type { ReceivedMail } from '../mail/catcher'

/** Mails shown at most. */
const SHOWN = 200

/** The tray of mails that the local catcher took. */
export class TrayService {
  /** @param open the catcher runs, and the tray may be looked into by whoever sits at this machine */
  constructor(
    private readonly dataSource: DataSource,
    private readonly open: boolean,
  ) {}

  /** Puts a mail into the tray. One that came before, by its Message-Id, is folded into the first. */
  async keep(mail: ReceivedMail): Promise<void> {
    await this.dataSource.manager
      .createQueryBuilder()
      .insert()
      .into(CaughtMail)
      .values({ ...mail })
      .orIgnore()
      .execute()
  }

  /**
   * The newest mails first.
   *
   * @throws {HttpError} NOT_FOUND where no catcher runs
   */
  async list(): Promise<CaughtMailBody[]> {
    if (!this.open) throw notFound('tray')
    const mails = await this.dataSource.manager.find(CaughtMail, {
      order: { caughtAt: 'DESC', id: 'ASC' },
      take: SHOWN,
    })
    return mails.map(({ id, caughtAt, from, to, subject, text }) => {
      return { id, caughtAt: caughtAt.toISOString(), from, to, subject, text }
    })
  }
}
