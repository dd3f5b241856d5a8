import { Decision } from './decision.entity'
import { DistributionBlock } from './distribution-block.entity'
import { Distribution } from './distribution.entity'
import { Group } from './group.entity'
import { JointDistribution } from './joint-distribution.entity'
import { Mapping } from './mapping.entity'
import { Membership } from './membership.entity'
import { Polymer } from './polymer.entity'
import { Potential } from './potential.entity'
import { SessionRecord } from './session-record.entity'
import { SetUpLink } from './set-up-link.entity'
import { Setting } from './setting.entity'
import { SourceFile } from './source-file.entity'
import { StatePoint } from './state-point.entity'
import { Term } from './term.entity'
import { User } from './user.entity'

/** Every table of the database. */
export const entities = [
  Decision,
  Distribution,
  DistributionBlock,
  Group,
  JointDistribution,
  Mapping,
  Membership,
  Polymer,
  Potential,
  SessionRecord,
  SetUpLink,
  Setting,
  SourceFile,
  StatePoint,
  Term,
  User,
]
