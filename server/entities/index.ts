import { ApiKey } from './api-key.entity'
import { Attempt } from './attempt.entity'
import { CaughtMail } from './caught-mail.entity'
import { Decision } from './decision.entity'
import { DeliveryDownload } from './delivery-download.entity'
import { DistributionBlock } from './distribution-block.entity'
import { Distribution } from './distribution.entity'
import { Event } from './event.entity'
import { Group } from './group.entity'
import { HandOverComment } from './hand-over-comment.entity'
import { HandOverFile } from './hand-over-file.entity'
import { HandOverMark } from './hand-over-mark.entity'
import { HandOverReview } from './hand-over-review.entity'
import { HandOverTable } from './hand-over-table.entity'
import { HandOver } from './hand-over.entity'
import { Invitation } from './invitation.entity'
import { JointDistribution } from './joint-distribution.entity'
import { LayoutVersion } from './layout-version.entity'
import { Layout } from './layout.entity'
import { Mail } from './mail.entity'
import { MappingVersion } from './mapping-version.entity'
import { Mapping } from './mapping.entity'
import { Membership } from './membership.entity'
import { PasswordReset } from './password-reset.entity'
import { Polymer } from './polymer.entity'
import { Potential } from './potential.entity'
import { Question } from './question.entity'
import { Recipient } from './recipient.entity'
import { ReturnedFile } from './returned-file.entity'
import { SessionRecord } from './session-record.entity'
import { SetUpLink } from './set-up-link.entity'
import { Setting } from './setting.entity'
import { SourceFile } from './source-file.entity'
import { StatePoint } from './state-point.entity'
import { Term } from './term.entity'
import { User } from './user.entity'
import { WarningAnswer } from './warning-answer.entity'

/** Every table of the database. */
export const entities = [
  ApiKey,
  Attempt,
  CaughtMail,
  Decision,
  DeliveryDownload,
  Distribution,
  DistributionBlock,
  Event,
  Group,
  HandOver,
  HandOverComment,
  HandOverFile,
  HandOverMark,
  HandOverReview,
  HandOverTable,
  Invitation,
  JointDistribution,
  Layout,
  LayoutVersion,
  Mail,
  Mapping,
  MappingVersion,
  Membership,
  PasswordReset,
  Polymer,
  Potential,
  Question,
  Recipient,
  ReturnedFile,
  SessionRecord,
  SetUpLink,
  Setting,
  SourceFile,
  StatePoint,
  Term,
  User,
  WarningAnswer,
]
