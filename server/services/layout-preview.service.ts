import type { LayoutPreview, LayoutPreviewAsk } from '../../shared/contracts/layout'
import { checkLayout, type Layout, layoutChecks, writeTableInLayout } from '../../shared/layouts'
import { sha256 } from './hashes'
import type { Member } from './member'
import { tableOf } from './table-file'
import { nameInLayout, tableFileName } from './table-names'
import type { TableService } from './table.service'

/** Lines of a preview at most: those at the beginning, and those at the end. */
export const PREVIEW_LINES = { head: 60, tail: 12 } as const

/** What a layout makes of a real table, while it is being edited. */
export class LayoutPreviewService {
  constructor(private readonly tables: TableService) {}

  /**
   * The first and the last lines of the very file that a download would give, and what was found in it.
   *
   * @throws {HttpError} as TableService.forTerm
   * @throws {InvalidInputError} as `checkLayout`; LAYOUT_INVALID when the layout does not fit the table
   */
  async preview(
    member: Member,
    termId: string,
    { statePointId, document }: LayoutPreviewAsk,
  ): Promise<LayoutPreview> {
    const layout: Layout = document
    checkLayout(layout)
    const source = await this.tables.source(member, termId, statePointId)
    const { table, about, beyond } = tableOf(source)
    const text = writeTableInLayout(table, layout, about, sha256, beyond)
    const lines = text.split(/\r?\n/).slice(0, -1)
    const { temperature } = source.statePoint
    const { head, tail } = PREVIEW_LINES
    const cut = lines.length > head + tail
    return {
      fileName: nameInLayout(tableFileName({ ...source.term, temperature }), layout),
      kind: table.kind,
      lines: lines.length,
      head: cut ? lines.slice(0, head) : lines,
      tail: cut ? lines.slice(-tail) : [],
      checks: layoutChecks(table, layout, beyond),
    }
  }
}
