import { Column, Entity, PrimaryColumn } from 'typeorm'

/** Something the installation made for itself on its first start, such as the secret that signs sessions. */
@Entity('setting')
export class Setting {
  @PrimaryColumn('text', { primaryKeyConstraintName: 'PK_setting' })
  key!: string

  @Column('text', { select: false })
  value!: string
}
