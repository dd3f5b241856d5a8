import type { DataSource } from 'typeorm'
import type { LinkTo } from '../mail/links'
import { AccessService } from './access.service'
import { AccountService } from './account.service'
import { AttemptService } from './attempt.service'
import { ComparisonService } from './comparison.service'
import { CoverageService } from './coverage.service'
import { DistributionService } from './distribution.service'
import { GroupService } from './group.service'
import { HandOverReleaseService } from './hand-over-release.service'
import { HandOverReviewService } from './hand-over-review.service'
import { HandOverService } from './hand-over.service'
import { HealthService } from './health.service'
import { HistoryService } from './history.service'
import { InvitationService } from './invitation.service'
import { JoinService } from './join.service'
import { JointDistributionService } from './joint-distribution.service'
import { JointTableService } from './joint-table.service'
import { KeyService } from './key.service'
import { MappingVersionService } from './mapping-version.service'
import { MailService } from './mail.service'
import { LayoutPreviewService } from './layout-preview.service'
import { LayoutService } from './layout.service'
import { MappingService } from './mapping.service'
import { MemberService } from './member.service'
import { PairService } from './pair.service'
import { PasswordResetService } from './password-reset.service'
import { PolymerService } from './polymer.service'
import { PotentialService } from './potential.service'
import { QuestionService } from './question.service'
import { ReceivedService } from './received.service'
import { RecipientService } from './recipient.service'
import { ReturnedFileService } from './returned-file.service'
import { SessionService } from './session.service'
import { SetUpService } from './set-up.service'
import { SettingService } from './setting.service'
import { StatePointService } from './state-point.service'
import { TableService } from './table.service'
import { TermEvidenceService } from './term-evidence.service'
import { TermService } from './term.service'
import { TrayService } from './tray.service'
import { WaitingService } from './waiting.service'
import { WarningAnswerService } from './warning-answer.service'

export type { UploadedBlocks } from './distribution-blocks'
export type { Download, Member, UploadedFile } from './member'

/** What the services are told beside the database. */
export interface ServiceOptions {
  /** The demo's people may sign in. */
  readonly demo: boolean
  /** Of the server, as /api/health tells it. */
  readonly version: string
  /** The tray of caught mails may be looked into. */
  readonly tray: boolean
  /** Makes the addresses in e-mails. */
  readonly linkTo: LinkTo
}

/** The rules of the house: everything routes, the start and the demo may ask for. */
export function createServices(dataSource: DataSource, { demo, version, tray, linkTo }: ServiceOptions) {
  const groups = new GroupService(dataSource)
  const sessions = new SessionService(dataSource, demo)
  const tables = new TableService(dataSource)
  return {
    access: new AccessService(dataSource),
    accounts: new AccountService(dataSource),
    attempts: new AttemptService(dataSource),
    comparisons: new ComparisonService(dataSource),
    coverages: new CoverageService(dataSource),
    distributions: new DistributionService(dataSource),
    groups,
    history: new HistoryService(dataSource),
    invitations: new InvitationService(dataSource, linkTo),
    joining: new JoinService(dataSource),
    handOvers: new HandOverService(dataSource),
    health: new HealthService(dataSource, version),
    jointDistributions: new JointDistributionService(dataSource),
    jointTables: new JointTableService(dataSource),
    keys: new KeyService(dataSource, sessions, demo),
    layoutPreviews: new LayoutPreviewService(dataSource, tables),
    layouts: new LayoutService(dataSource),
    mappings: new MappingService(dataSource),
    mappingVersions: new MappingVersionService(dataSource),
    mails: new MailService(dataSource),
    members: new MemberService(dataSource),
    pairs: new PairService(dataSource),
    passwordResets: new PasswordResetService(dataSource, linkTo),
    polymers: new PolymerService(dataSource),
    potentials: new PotentialService(dataSource),
    questions: new QuestionService(dataSource, linkTo),
    received: new ReceivedService(dataSource, linkTo),
    recipients: new RecipientService(dataSource, linkTo),
    releases: new HandOverReleaseService(dataSource),
    reviews: new HandOverReviewService(dataSource, linkTo),
    returnedFiles: new ReturnedFileService(dataSource, linkTo),
    sessions,
    settings: new SettingService(dataSource),
    setUp: new SetUpService(dataSource, groups),
    statePoints: new StatePointService(dataSource),
    tables,
    termEvidence: new TermEvidenceService(dataSource),
    terms: new TermService(dataSource),
    tray: new TrayService(dataSource, tray),
    waiting: new WaitingService(dataSource),
    warningAnswers: new WarningAnswerService(dataSource),
  }
}
export type Services = ReturnType<typeof createServices>
