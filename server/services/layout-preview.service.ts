import type { DataSource } from 'typeorm'
import type { LayoutExample, LayoutPreview, LayoutPreviewAsk } from '../../shared/contracts/layout'
import { checkLayout, type Layout, layoutChecks, writeTableInLayout } from '../../shared/layouts'
import { termName } from '../../shared/mapping'
import { sha256 } from './hashes'
import type { Member } from './member'
import { tableOf } from './table-file'
import { nameInLayout, tableFileName } from './table-names'
import type { TableService } from './table.service'

/** Lines of a preview at most: those at the beginning, and those at the end. */
export const PREVIEW_LINES = { head: 60, tail: 12 } as const

/** Examples to choose from at most. */
const MOST_EXAMPLES = 60

/** What a layout makes of a real table, while it is being edited. */
export class LayoutPreviewService {
  constructor(
    private readonly dataSource: DataSource,
    private readonly tables: TableService,
  ) {}

  /** Saved potentials of current terms that a layout can be tried on: one of each kind first, at most `MOST_EXAMPLES`. */
  async examples({ groupId }: Member): Promise<LayoutExample[]> {
    const rows: (Omit<LayoutExample, 'term'> & { types: string[] })[] = await this.dataSource.query(
      `select t."id" as "termId", s."id" as "statePointId", t."kind", t."types", s."temperature",
              m."name" as "mapping", p."name" as "polymer"
         from "potential" o
         join "term" t on t."id" = o."term_id"
         join "state_point" s on s."id" = o."state_point_id"
         join "mapping" m on m."id" = t."mapping_id"
         join "polymer" p on p."id" = m."polymer_id"
        where o."group_id" = $1 and t."current"
        order by row_number() over (partition by t."kind" order by p."name", m."name", s."temperature", t."position"),
                 t."kind"
        limit $2`,
      [groupId, MOST_EXAMPLES],
    )
    return rows.map(({ types, ...row }) => ({ ...row, term: termName(types) }))
  }

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
