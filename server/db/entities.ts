import { Account, OneTimeLink } from '../modules/accounts/account.entity';
import { Checkout, Tool } from '../modules/crib/crib.entity';
import { DrawingSettingsRow, Placement } from '../modules/frames/drawing.entity';
import { Frame } from '../modules/frames/frame.entity';
import { BuildDay, DisplayToken, Installation, Station } from '../modules/installations/installation.entity';
import { Person } from '../modules/people/person.entity';
import {
  Briefing,
  BriefingVersion,
  RegisterRow,
  SignOffRow,
  StopRow,
  StopSeen,
} from '../modules/safety/safety.entity';
import { Split } from '../modules/split/split.entity';
import { Claim, StepRow, SubAssembly, TravellerTemplate } from '../modules/travellers/traveller.entity';
import { DayLogRow, IdempotencyRow, MailRow, OutboxLetterRow, SessionRow } from './plumbing.entity';

/** Every table. The migrations are tested against this list. */
export const ENTITIES = [
  Account,
  OneTimeLink,
  SessionRow,
  IdempotencyRow,
  DayLogRow,
  MailRow,
  OutboxLetterRow,
  Installation,
  BuildDay,
  Station,
  DisplayToken,
  Person,
  Frame,
  Placement,
  DrawingSettingsRow,
  Split,
  TravellerTemplate,
  SubAssembly,
  StepRow,
  Claim,
  Briefing,
  BriefingVersion,
  SignOffRow,
  RegisterRow,
  StopRow,
  StopSeen,
  Tool,
  Checkout,
];
