import type { GraphQLResolveInfo, GraphQLScalarType, GraphQLScalarTypeConfig } from 'graphql';
import type { Context } from '#server/http/context';
export type Maybe<T> = T | null;
export type InputMaybe<T> = Maybe<T>;
export type RequireFields<T, K extends keyof T> = Omit<T, K> & { [P in K]-?: NonNullable<T[P]> };
/** All built-in and custom scalars, mapped to their actual values */
export type Scalars = {
  ID: { input: string; output: string; }
  String: { input: string; output: string; }
  Boolean: { input: boolean; output: boolean; }
  Int: { input: number; output: number; }
  Float: { input: number; output: number; }
  /** An opaque place in a shop's stream of events. Hand it back as it came. */
  Cursor: { input: string; output: string; }
  /** A local calendar date in the shop's time zone: 2026-12-01. */
  Date: { input: string; output: string; }
  /** An instant in UTC, ISO 8601 with a Z: 2026-12-01T14:06:00Z. */
  DateTime: { input: string; output: string; }
  /** A length in whole nanometres, as a decimal string (it does not fit an Int): 1 mm is "1000000", 1/64 inch is "396875". */
  Length: { input: string; output: string; }
};

/** The shop's latest reading of its air. */
export type AirReading = {
  __typename?: 'AirReading';
  /** When it was read. */
  at: Scalars['DateTime']['output'];
  /** Relative humidity in percent. */
  humidityPercent?: Maybe<Scalars['Int']['output']>;
  /** Temperature in tenths of a degree Celsius. */
  temperatureTenthsC: Scalars['Int']['output'];
};

/** Another system that talks to this shop with a key. */
export type ApiKey = {
  __typename?: 'ApiKey';
  /** When it was made. */
  createdAt: Scalars['DateTime']['output'];
  /** When it runs out; null for never. */
  expiresAt?: Maybe<Scalars['DateTime']['output']>;
  /** The key's id. */
  id: Scalars['ID']['output'];
  /** The last four characters. */
  lastFour: Scalars['String']['output'];
  /** When it was last used, to the minute. */
  lastUsedAt?: Maybe<Scalars['DateTime']['output']>;
  /** The name people gave it. */
  name: Scalars['String']['output'];
  /** The first characters of the key, to recognise it by. */
  prefix: Scalars['String']['output'];
  /** When it was revoked. */
  revokedAt?: Maybe<Scalars['DateTime']['output']>;
  /** What it may do. */
  scopes: Array<ApiScope>;
};

export type ApiKeyPayload = {
  __typename?: 'ApiKeyPayload';
  /** The key's record. */
  apiKey?: Maybe<ApiKey>;
  /** The key itself. It is shown this once and stored only as a hash. */
  key?: Maybe<Scalars['String']['output']>;
  /** Why it did not work. */
  problems: Array<Problem>;
};

/** What an API key may read or do. */
export type ApiScope =
  /** Read orders' customers. */
  | 'CUSTOMERS_READ'
  /** Read orders, their status, stage, progress and forecast. */
  | 'ORDERS_READ';

/** N boards of one design that go through the shop together. */
export type Batch = {
  __typename?: 'Batch';
  /** The person it is given to. */
  assignedTo?: Maybe<Scalars['ID']['output']>;
  /** How many blocks are glued for it. */
  blocks: Scalars['Int']['output'];
  /** How many boards. */
  boards: Scalars['Int']['output'];
  /** A code people can say aloud, such as CT-014. */
  code: Scalars['String']['output'];
  /** The design's id. */
  designId: Scalars['ID']['output'];
  /** The day the customer has it. */
  dueDate?: Maybe<Scalars['Date']['output']>;
  /** When the plan expects it to be ready; null until there is a plan. */
  forecast?: Maybe<Forecast>;
  /** The batch's id. */
  id: Scalars['ID']['output'];
  /** What it keeps occupied now. */
  occupations: Array<Occupation>;
  /** Its overridden holds, the oldest first. */
  overrides: Array<HoldOverride>;
  /** How many panels are glued for it. */
  panels: Scalars['Int']['output'];
  /** Where it stands at the moment of asking. */
  place: Place;
  /** When it was let onto the floor. */
  releasedAt?: Maybe<Scalars['DateTime']['output']>;
  /** The id of its own copy of the route. */
  routeId: Scalars['ID']['output'];
  /** Its steps as far as they have gone. */
  runs: Array<StepRun>;
  /** The day the plan aims at. */
  shipBy?: Maybe<Scalars['Date']['output']>;
  /** When it left the shop. */
  shippedAt?: Maybe<Scalars['DateTime']['output']>;
  /** The last command on it that can still be undone, if there is one. */
  undo?: Maybe<UndoableCommand>;
  /** The version that every command must name. */
  version: Scalars['Int']['output'];
};

/** What happened to a batch. */
export type BatchEvent = {
  __typename?: 'BatchEvent';
  /** Who did it; null when the product did. */
  by?: Maybe<Scalars['ID']['output']>;
  /** When it happened. */
  happenedAt: Scalars['DateTime']['output'];
  /** When it was recorded. */
  recordedAt: Scalars['DateTime']['output'];
  /** What happened, in words. */
  sentence: Scalars['String']['output'];
  /** The event's number in the shop. */
  seq: Scalars['Int']['output'];
  /** The kind of event, such as STEP_STARTED. */
  type: Scalars['String']['output'];
};

export type BatchEventPage = {
  __typename?: 'BatchEventPage';
  /** The events, the newest first. */
  nodes: Array<BatchEvent>;
  /** Whether there are older ones. */
  pageInfo: PageInfo;
};

export type BatchPayload = {
  __typename?: 'BatchPayload';
  /** The batch after the command, or as it stands when the command was refused. */
  batch?: Maybe<Batch>;
  /** The number of the event that the command became. */
  event?: Maybe<Scalars['Int']['output']>;
  /** Why it was refused; empty when it was carried out. */
  problems: Array<Problem>;
};

/** Clamps of one length. */
export type ClampClass = {
  __typename?: 'ClampClass';
  /** How many the shop has. */
  count: Scalars['Int']['output'];
  /** The key, such as c600. */
  key: Scalars['String']['output'];
  /** The longest work the clamp closes on. */
  length: Scalars['Length']['output'];
};

export type ClampClassInput = {
  /** How many there are. */
  count: Scalars['Int']['input'];
  /** The key of an existing class; null for a new one. */
  key?: InputMaybe<Scalars['String']['input']>;
  /** The longest work the clamp closes on. */
  length: Scalars['Length']['input'];
};

/** How many clamps a piece takes. */
export type ClampNeed = {
  __typename?: 'ClampNeed';
  /** How many. */
  count: Scalars['Int']['output'];
  /** The shortest length class that will do; a longer one may stand in. */
  length: Scalars['Length']['output'];
};

export type CreateBatchInput = {
  /** How many boards, 1 to 200. */
  boards: Scalars['Int']['input'];
  /** The design. */
  designId: Scalars['ID']['input'];
  /** The day the customer has it; null for stock. */
  dueDate?: InputMaybe<Scalars['Date']['input']>;
  /** A key that makes a repeated call harmless: the same key gives the same batch. */
  idempotencyKey?: InputMaybe<Scalars['String']['input']>;
  /** Order lines that the batch makes, if any. */
  orderLineIds?: InputMaybe<Array<Scalars['ID']['input']>>;
};

export type CreateOrderInput = {
  /** The client's own reference, unique for the client, up to 80 characters. */
  clientReference?: InputMaybe<Scalars['String']['input']>;
  /** The customer's e-mail address, if known. */
  customerEmail?: InputMaybe<Scalars['String']['input']>;
  /** The customer's name, 1 to 120 characters. */
  customerName: Scalars['String']['input'];
  /** The day the customer has it. */
  dueDate: Scalars['Date']['input'];
  /** One to 50 lines. */
  lines: Array<OrderLineInput>;
};

/** Someone who orders. */
export type Customer = {
  __typename?: 'Customer';
  /** The e-mail address, if known. */
  email?: Maybe<Scalars['String']['output']>;
  /** The customer's id. */
  id: Scalars['ID']['output'];
  /** The name. */
  name: Scalars['String']['output'];
};

/** A board's pattern and finished size. */
export type Design = {
  __typename?: 'Design';
  /** Clamps that one block takes, and the shortest length that will do. */
  blockClamps: ClampNeed;
  /** How many blocks make one board, usually one. */
  blocksPerBoard: Scalars['Int']['output'];
  /** The design's id. */
  id: Scalars['ID']['output'];
  /** Finished length, along the slices. */
  length: Scalars['Length']['output'];
  /** The name. */
  name: Scalars['String']['output'];
  /** How many boards one group of panels gives. */
  panelBoards: Scalars['Int']['output'];
  /** Clamps that one panel takes, and the shortest length that will do. */
  panelClamps: ClampNeed;
  /** How many panels are glued for each group of panelBoards boards. */
  panelCount: Scalars['Int']['output'];
  /** How many slices make a board. */
  slices: Scalars['Int']['output'];
  /** The strips of one slice in order. */
  strips: Array<Strip>;
  /** Finished thickness. */
  thickness: Scalars['Length']['output'];
  /** The version that a change must name. */
  version: Scalars['Int']['output'];
  /** Finished width. */
  width: Scalars['Length']['output'];
};

export type DesignInput = {
  /** Clamps that one block takes, 0 to 40. */
  blockClampCount: Scalars['Int']['input'];
  /** Blocks of one board, 1 to 4. */
  blocksPerBoard: Scalars['Int']['input'];
  /** Finished length. */
  length: Scalars['Length']['input'];
  /** The name, 1 to 60 characters, unique in the shop. */
  name: Scalars['String']['input'];
  /** Boards that one group of panels gives, 1 to 24. */
  panelBoards: Scalars['Int']['input'];
  /** Clamps that one panel takes, 0 to 40. */
  panelClampCount: Scalars['Int']['input'];
  /** Panels for each group of boards, 1 to 6. */
  panelCount: Scalars['Int']['input'];
  /** Slices of a board, 1 to 60. */
  slices: Scalars['Int']['input'];
  /** The strips of one slice, 1 to 40. */
  strips: Array<StripInput>;
  /** Finished thickness. */
  thickness: Scalars['Length']['input'];
  /** Finished width. */
  width: Scalars['Length']['input'];
};

export type DesignPayload = {
  __typename?: 'DesignPayload';
  /** The design. */
  design?: Maybe<Design>;
  /** Why it did not work. */
  problems: Array<Problem>;
};

/** Everything the Floor shows, read at one moment. */
export type Floor = {
  __typename?: 'Floor';
  /** All batches that have not left the shop. */
  batches: Array<Batch>;
  /** The place in the stream of events at which this was read. */
  cursor: Scalars['Cursor']['output'];
  /** The designs that the batches need, and all others. */
  designs: Array<Design>;
  /** The people. */
  members: Array<Member>;
  /** The server's clock when it was read. */
  now: Scalars['DateTime']['output'];
  /** The route copies that the batches use. */
  routes: Array<Route>;
  /** The shop. */
  shop: Shop;
  /** How many paired screens and browsers are watching this shop. */
  watchers: Scalars['Int']['output'];
};

/** What changed on the floor since the last message. */
export type FloorChange = {
  __typename?: 'FloorChange';
  /** The batches that changed, as they are now. */
  batches: Array<Batch>;
  /** Who did it and what, for the last of the events. */
  by?: Maybe<Scalars['ID']['output']>;
  /** The place in the stream after this message. */
  cursor: Scalars['Cursor']['output'];
  /** The server's clock. */
  now: Scalars['DateTime']['output'];
  /** Whether the subscriber is too far behind: read the Floor again. */
  reset: Scalars['Boolean']['output'];
  /** Whether the shop's settings, people or designs changed: read the Floor again. */
  shopChanged: Scalars['Boolean']['output'];
  /** How many screens and browsers are watching. */
  watchers: Scalars['Int']['output'];
};

/** When the plan expects a batch to be ready. */
export type Forecast = {
  __typename?: 'Forecast';
  /** When its next work step starts, by the latest plan; null when none is left. */
  nextStartAt?: Maybe<Scalars['DateTime']['output']>;
  /** When all its steps are done, by the latest plan. */
  readyAt: Scalars['DateTime']['output'];
  /** Whole working days early (positive) or late (negative) against the ship-by date; null without a date. */
  slackDays?: Maybe<Scalars['Int']['output']>;
  /** Working minutes between readyAt and the end of work on the ship-by date; negative when late; null without a date. */
  slackMinutes?: Maybe<Scalars['Int']['output']>;
};

/** Why a piece must be left alone. */
export type HoldKind =
  /** Wood comes to the shop's air. */
  | 'ACCLIMATION'
  /** In clamps. */
  | 'CLAMPED'
  /** Glue cures. */
  | 'CURE'
  /** Between coats. */
  | 'DWELL'
  /** Filler cures. */
  | 'FILLER_CURE'
  /** A drying oil cures in full. */
  | 'FINISH_CURE'
  /** Not a hold but a limit: glue wants fresh faces. */
  | 'FRESHNESS'
  /** Oil soaks in. */
  | 'SOAK';

/** A hold that was overridden. It stays on the batch for ever. */
export type HoldOverride = {
  __typename?: 'HoldOverride';
  /** When. */
  at: Scalars['DateTime']['output'];
  /** Who. */
  by: Scalars['ID']['output'];
  /** The override's id. */
  id: Scalars['ID']['output'];
  /** The piece; 0 for the batch. */
  piece: Scalars['Int']['output'];
  /** The written reason. */
  reason: Scalars['String']['output'];
  /** Whether the owner has seen it. */
  seen: Scalars['Boolean']['output'];
  /** The wait that was cut short. */
  step: Scalars['String']['output'];
};

/** A span of working time inside one local day, half open: [fromMinute, toMinute). */
export type HourSpan = {
  __typename?: 'HourSpan';
  /** Minutes since the day's midnight, 0 to 1439. */
  fromMinute: Scalars['Int']['output'];
  /** Minutes since the day's midnight, 1 to 1440. */
  toMinute: Scalars['Int']['output'];
};

export type HourSpanInput = {
  /** Minutes since the day's midnight, 0 to 1439. */
  fromMinute: Scalars['Int']['input'];
  /** Minutes since the day's midnight, 1 to 1440. */
  toMinute: Scalars['Int']['input'];
};

/** A date on which the usual weekly hours do not hold. */
export type HoursException = {
  __typename?: 'HoursException';
  /** The local date. */
  date: Scalars['Date']['output'];
  /** Why, in a word or two. */
  reason?: Maybe<Scalars['String']['output']>;
  /** The spans worked on that date; empty when the shop is closed. */
  spans: Array<HourSpan>;
};

export type HoursExceptionInput = {
  /** The local date. */
  date: Scalars['Date']['input'];
  /** Why, in a word or two. */
  reason?: InputMaybe<Scalars['String']['input']>;
  /** The spans worked; empty when closed. */
  spans: Array<HourSpanInput>;
};

/** How lengths are shown. They are stored in nanometres. */
export type LengthUnit =
  /** Inches and fractions. */
  | 'INCH'
  /** Millimetres. */
  | 'MILLIMETRE';

/** A person of the shop. */
export type Member = {
  __typename?: 'Member';
  /** The member's id. */
  id: Scalars['ID']['output'];
  /** Two or three letters for cards and screens. */
  initials: Scalars['String']['output'];
  /** The name the shop uses, such as Ines. */
  name: Scalars['String']['output'];
  /** What the member may do. */
  roles: Array<Role>;
  /** What the member can do: keys of skills, such as machining. */
  skills: Array<Scalars['String']['output']>;
  /** The member's own weekly hours; null when they are the shop's. */
  weekly?: Maybe<Array<Array<HourSpan>>>;
};

export type MoveBatchInput = {
  /** The batch. */
  batchId: Scalars['ID']['input'];
  /** When it happened; null for now. */
  happenedAt?: InputMaybe<Scalars['DateTime']['input']>;
  /** Set to cut a running hold short. */
  override?: InputMaybe<OverrideInput>;
  /** Why; needed when it goes back (rework). */
  reason?: InputMaybe<Scalars['String']['input']>;
  /** Where it goes. */
  to: Place;
  /** The version of it that the person saw. */
  version: Scalars['Int']['input'];
};

export type Mutation = {
  __typename?: 'Mutation';
  /** Gives a batch to a person, or to no one. */
  assignBatch: BatchPayload;
  /** Makes a key. */
  createApiKey: ApiKeyPayload;
  /** Makes a batch; it stands in QUEUED until someone lets it onto the floor. */
  createBatch: BatchPayload;
  /** Makes a design. */
  createDesign: DesignPayload;
  /** Enters an order. */
  createOrder: OrderPayload;
  /** Ends all of the person's sessions but the one that asks. */
  endOtherSessions: SessionsPayload;
  /** Ends one of the person's sessions. */
  endSession: SessionsPayload;
  /** Finishes a step on one or more pieces. */
  finishStep: BatchPayload;
  /** Moves a batch to another stage: forward finishes the steps in between, back is rework. */
  moveBatch: BatchPayload;
  /** An owner enters the code that a display shows. */
  pairScreen: ScreensPayload;
  /** Whether the server answers commands at all; changes nothing. */
  ping: Scalars['Boolean']['output'];
  /** A display asks whether someone entered its code. */
  pollPairing: PairingAnswer;
  /** Ends a key at once. */
  revokeApiKey: ApiKeyPayload;
  /** Ends a screen's token at once. */
  revokeScreen: ScreensPayload;
  /** Marks an override as seen by the owner. */
  seeOverride: Scalars['Boolean']['output'];
  /** Sets the shop's clamps. A class whose clamps are in use keeps at least as many. */
  setClamps: ShopPayload;
  /** Sets the shop's weekly hours and dated exceptions. */
  setHours: ShopPayload;
  /** Signs a person in. The answer and its time are the same for an unknown address as for a wrong password. */
  signIn: SignInPayload;
  /** Ends the session that asks. */
  signOut: Scalars['Boolean']['output'];
  /** Makes a shop and its owner, and signs the owner in. */
  signUp: SignInPayload;
  /** A display asks for a code. */
  startPairing: Pairing;
  /** Starts a step on one or more pieces. */
  startStep: BatchPayload;
  /** Turns the session to another of the person's shops. */
  switchShop: SignInPayload;
  /** Takes the last command on a batch back, within ten minutes. */
  undoCommand: BatchPayload;
};


export type MutationAssignBatchArgs = {
  batchId: Scalars['ID']['input'];
  memberId?: InputMaybe<Scalars['ID']['input']>;
  version: Scalars['Int']['input'];
};


export type MutationCreateApiKeyArgs = {
  expiresInDays?: InputMaybe<Scalars['Int']['input']>;
  name: Scalars['String']['input'];
  scopes: Array<ApiScope>;
};


export type MutationCreateBatchArgs = {
  input: CreateBatchInput;
};


export type MutationCreateDesignArgs = {
  input: DesignInput;
};


export type MutationCreateOrderArgs = {
  input: CreateOrderInput;
};


export type MutationEndSessionArgs = {
  id: Scalars['ID']['input'];
};


export type MutationFinishStepArgs = {
  input: StepCommandInput;
};


export type MutationMoveBatchArgs = {
  input: MoveBatchInput;
};


export type MutationPairScreenArgs = {
  code: Scalars['String']['input'];
  name: Scalars['String']['input'];
};


export type MutationPollPairingArgs = {
  secret: Scalars['String']['input'];
};


export type MutationRevokeApiKeyArgs = {
  id: Scalars['ID']['input'];
};


export type MutationRevokeScreenArgs = {
  id: Scalars['ID']['input'];
};


export type MutationSeeOverrideArgs = {
  id: Scalars['ID']['input'];
};


export type MutationSetClampsArgs = {
  clamps: Array<ClampClassInput>;
  version: Scalars['Int']['input'];
};


export type MutationSetHoursArgs = {
  exceptions: Array<HoursExceptionInput>;
  version: Scalars['Int']['input'];
  weekly: Array<Array<HourSpanInput>>;
};


export type MutationSignInArgs = {
  email: Scalars['String']['input'];
  password: Scalars['String']['input'];
};


export type MutationSignUpArgs = {
  input: SignUpInput;
};


export type MutationStartStepArgs = {
  input: StepCommandInput;
};


export type MutationSwitchShopArgs = {
  shopId: Scalars['ID']['input'];
};


export type MutationUndoCommandArgs = {
  batchId: Scalars['ID']['input'];
  event: Scalars['Int']['input'];
};

/** Something that a batch keeps occupied now. */
export type Occupation = {
  __typename?: 'Occupation';
  /** How much of it. */
  amount: Scalars['Int']['output'];
  /** Whether it is clamps (true) or a station (false). */
  isClamps: Scalars['Boolean']['output'];
  /** The piece it was taken for; 0 for the batch. */
  piece: Scalars['Int']['output'];
  /** A station's or a clamp class's key. */
  resource: Scalars['String']['output'];
  /** Since when. */
  since: Scalars['DateTime']['output'];
  /** The step that took it. */
  step: Scalars['String']['output'];
};

/** What a customer ordered, for a date. */
export type Order = {
  __typename?: 'Order';
  /** The reference of the client that sent it; null when a person entered it. */
  clientReference?: Maybe<Scalars['String']['output']>;
  /** The code, such as OR-1007. */
  code: Scalars['String']['output'];
  /** When it was entered. */
  createdAt: Scalars['DateTime']['output'];
  /** The customer. Null for whoever may not see customers. */
  customer?: Maybe<Customer>;
  /** The day the customer has it. */
  dueDate: Scalars['Date']['output'];
  /** When the plan expects the last line to be ready. */
  forecastReadyAt?: Maybe<Scalars['DateTime']['output']>;
  /** The order's id. */
  id: Scalars['ID']['output'];
  /** The lines. */
  lines: Array<OrderLine>;
  /** Whether the plan keeps the ship-by date; null when there is no forecast. */
  onTime?: Maybe<Scalars['Boolean']['output']>;
  /** How much of its work and waiting is done, in whole percent. */
  progressPercent: Scalars['Int']['output'];
  /** Due less transit and packing: what the plan aims at. */
  shipBy: Scalars['Date']['output'];
  /** The least advanced stage of all its batches; null when no batch makes it. */
  stage?: Maybe<Place>;
  /** Where the order stands: its least advanced line. */
  status: OrderStatus;
  /** The version that a change must name. */
  version: Scalars['Int']['output'];
};

/** Boards of one design in an order. */
export type OrderLine = {
  __typename?: 'OrderLine';
  /** Codes of the batches that make it. */
  batchCodes: Array<Scalars['String']['output']>;
  /** How many boards. */
  count: Scalars['Int']['output'];
  /** The design's id. */
  designId: Scalars['ID']['output'];
  /** The design's name. */
  designName: Scalars['String']['output'];
  /** When the plan expects the line to be ready; null when no batch makes it or there is no plan yet. */
  forecastReadyAt?: Maybe<Scalars['DateTime']['output']>;
  /** The line's id. */
  id: Scalars['ID']['output'];
  /** How much of its work and waiting is done, in whole percent. */
  progressPercent: Scalars['Int']['output'];
  /** The least advanced stage of its batches; null when no batch makes it. */
  stage?: Maybe<Place>;
  /** Where the line stands. */
  status: OrderStatus;
};

export type OrderLineInput = {
  /** How many boards, 1 to 500. */
  count: Scalars['Int']['input'];
  /** The design. */
  designId: Scalars['ID']['input'];
};

export type OrderPage = {
  __typename?: 'OrderPage';
  /** The orders by due date, the earliest first. */
  nodes: Array<Order>;
  /** Whether there are more. */
  pageInfo: PageInfo;
  /** How many there are in all. With a status other than SHIPPED: how many of the first 500 open orders have it. */
  totalCount: Scalars['Int']['output'];
};

export type OrderPayload = {
  __typename?: 'OrderPayload';
  /** The order. */
  order?: Maybe<Order>;
  /** Why it did not work. */
  problems: Array<Problem>;
};

/** Where an order, or a line of it, stands. Derived from the floor. */
export type OrderStatus =
  /** At least one of its batches is on the floor. */
  | 'IN_WORK'
  /** Batches are made for it and wait in the queue. */
  | 'PLANNED'
  /** All its boards are ready. */
  | 'READY'
  /** Received; no batch makes it yet. */
  | 'RECEIVED'
  /** All its boards have left the shop. */
  | 'SHIPPED';

/** An override of a running hold. Only owners and makers may. */
export type OverrideInput = {
  /** Whether the person has read the caution that goes with it. */
  cautionRead: Scalars['Boolean']['input'];
  /** The written reason, 3 to 500 characters. */
  reason: Scalars['String']['input'];
};

/** Which part of a list there is beyond this page. */
export type PageInfo = {
  __typename?: 'PageInfo';
  /** The cursor of the page's last entry; null on an empty page. */
  endCursor?: Maybe<Scalars['String']['output']>;
  /** Whether there is more after this page. */
  hasNextPage: Scalars['Boolean']['output'];
};

/** What an unpaired display shows, and the secret with which it asks whether it was paired. */
export type Pairing = {
  __typename?: 'Pairing';
  /** The short code that an owner enters; good for ten minutes, once. */
  code: Scalars['String']['output'];
  /** When the code runs out. */
  expiresAt: Scalars['DateTime']['output'];
  /** The display's own 256-bit secret. Never shown. */
  secret: Scalars['String']['output'];
};

/** What a display gets when it asks whether it was paired. */
export type PairingAnswer = {
  __typename?: 'PairingAnswer';
  /** Whether it is still waiting, paired, or the code ran out. */
  state: PairingState;
  /** The read-only token, once, when it was paired. */
  token?: Maybe<Scalars['String']['output']>;
};

export type PairingState =
  /** The code ran out or was used: start over. */
  | 'EXPIRED'
  /** Paired: here is the token. */
  | 'PAIRED'
  /** Nobody has entered the code yet. */
  | 'WAITING';

/** Where a batch stands: before, in or after the stages. */
export type Place =
  /** Strips are milled and ripped. */
  | 'BLANK'
  /** Boards are oiled, wiped and checked. */
  | 'FINISH'
  /** Panels are glued, clamped and cured. */
  | 'FIRST_GLUE_UP'
  /** Made, but not yet let onto the floor. */
  | 'QUEUED'
  /** All steps are done. */
  | 'READY'
  /** Boards are sanded and gaps filled. */
  | 'SAND'
  /** Slices are glued to blocks, clamped and cured. */
  | 'SECOND_GLUE_UP'
  /** The boards have left the shop. */
  | 'SHIPPED'
  /** Panels are flattened and sliced. */
  | 'SLICE'
  /** Blocks are flattened and trimmed. */
  | 'SURFACE';

/** A start and an end for every step of every open batch. */
export type Plan = {
  __typename?: 'Plan';
  /** When it was made. */
  madeAt: Scalars['DateTime']['output'];
  /** The event up to which the floor is in it. */
  seq: Scalars['Int']['output'];
  /** The steps that have not ended, by start. */
  steps: Array<PlannedStep>;
  /** Batches that could not be planned, with the reason in words. */
  unplanned: Array<UnplannedBatch>;
  /** The plan's number in the shop. */
  version: Scalars['Int']['output'];
};

/** One step of the plan. */
export type PlannedStep = {
  __typename?: 'PlannedStep';
  /** The batch's id. */
  batchId: Scalars['ID']['output'];
  /** When it ends. */
  endAt: Scalars['DateTime']['output'];
  /** The people it is planned with. */
  members: Array<Scalars['ID']['output']>;
  /** The piece; 0 for the batch. */
  piece: Scalars['Int']['output'];
  /** Why it does not start earlier, in words. */
  reason?: Maybe<Scalars['String']['output']>;
  /** When it starts. */
  startAt: Scalars['DateTime']['output'];
  /** The step's key in the batch's route. */
  step: Scalars['String']['output'];
};

/** What kept a command from being carried out, in a form for programs and in words for people. */
export type Problem = {
  __typename?: 'Problem';
  /** A stable code, such as HOLD_RUNNING or VERSION_CONFLICT. */
  code: Scalars['String']['output'];
  /** The input field it is about, as a dotted path, or null when it is about the whole command. */
  field?: Maybe<Scalars['String']['output']>;
  /** A sentence for a person: the rule, the reason and the way out. */
  sentence: Scalars['String']['output'];
};

/** A glue or a finish, from its maker's data sheet or, until the shop has entered that, a default that leans to the safe side. */
export type Profile = {
  __typename?: 'Profile';
  /** Whether the figures are the product's defaults rather than the data sheet's. */
  isDefault: Scalars['Boolean']['output'];
  /** The profile's key, such as d3-pva. */
  key: Scalars['String']['output'];
  /** Whether it is a glue or a finish. */
  kind: ProfileKind;
  /** The name, by type and standard class. */
  name: Scalars['String']['output'];
  /** What to hold to: the data sheet comes first. */
  note: Scalars['String']['output'];
};

export type ProfileKind =
  /** An oil or another finish. */
  | 'FINISH'
  /** An adhesive. */
  | 'GLUE';

export type Query = {
  __typename?: 'Query';
  /** The shop's API keys, the newest first. */
  apiKeys: Array<ApiKey>;
  /** One batch by its code. */
  batch?: Maybe<Batch>;
  /** What happened to a batch, the newest first, 1 to 100 at a time. */
  batchHistory: BatchEventPage;
  /** The shop's designs by name. */
  designs: Array<Design>;
  /** The Floor, read at one moment. */
  floor: Floor;
  /** The shop's people. */
  members: Array<Member>;
  /** The server's clock, for countdowns that do not trust the device's. */
  now: Scalars['DateTime']['output'];
  /** One order by its code or, for an API client, null when it is not there. */
  order?: Maybe<Order>;
  /** Orders by due date, 1 to 100 at a time. A status other than SHIPPED is looked for in the first 500 open orders. */
  orders: OrderPage;
  /** The latest plan; null when none was made yet. */
  plan?: Maybe<Plan>;
  /** The shop's paired screens. */
  screens: Array<Screen>;
  /** The person's sessions, the newest first. */
  sessions: Array<Session>;
  /** The shop of whoever asks. */
  shop: Shop;
  /** Overrides that the owner has not seen yet. */
  unseenOverrides: Array<UnseenOverride>;
  /** Who is signed in; null when no one is. */
  viewer?: Maybe<Viewer>;
};


export type QueryBatchArgs = {
  code: Scalars['String']['input'];
};


export type QueryBatchHistoryArgs = {
  after?: InputMaybe<Scalars['String']['input']>;
  batchId: Scalars['ID']['input'];
  first?: InputMaybe<Scalars['Int']['input']>;
};


export type QueryOrderArgs = {
  code: Scalars['String']['input'];
};


export type QueryOrdersArgs = {
  after?: InputMaybe<Scalars['String']['input']>;
  first?: InputMaybe<Scalars['Int']['input']>;
  status?: InputMaybe<OrderStatus>;
};

/** What a person may do in a shop. One person may have several roles. */
export type Role =
  /** Sees the Floor; starts, finishes and moves batches when the rules allow. */
  | 'HELPER'
  /** API clients and their logs; nothing of the floor's controls. */
  | 'INTEGRATOR'
  /** Plans, starts, finishes, moves, overrides a hold with a reason; designs and stock. */
  | 'MAKER'
  /** Orders and customers; sees the plan; moves no batch. */
  | 'OFFICE'
  /** Everything: members, money, settings, API clients. */
  | 'OWNER';

/** A batch's own copy of the route. It never changes; batches with the same copy share it. */
export type Route = {
  __typename?: 'Route';
  /** The copy's id. */
  id: Scalars['ID']['output'];
  /** The steps in order. */
  steps: Array<RouteStep>;
};

/** One step of a route. */
export type RouteStep = {
  __typename?: 'RouteStep';
  /** For waits: the step from whose finish it counts. */
  after?: Maybe<Scalars['String']['output']>;
  /** The code of the caution to show with it. */
  caution?: Maybe<Scalars['String']['output']>;
  /** For waits: the kind of hold. */
  hold?: Maybe<HoldKind>;
  /** The key, unique in the route. */
  key: Scalars['String']['output'];
  /** Work or wait. */
  kind: StepKind;
  /** For waits: not after this many minutes; null for no limit. */
  maxMinutes?: Maybe<Scalars['Int']['output']>;
  /** For waits: not before this many minutes. */
  minMinutes: Scalars['Int']['output'];
  /** The name as after "start" and "finish": milling, 80 grit. */
  name: Scalars['String']['output'];
  /** Whether the work may stop where hours stop and go on later. */
  pausable: Scalars['Boolean']['output'];
  /** How many people it needs. */
  people: Scalars['Int']['output'];
  /** Minutes for each board (scope BATCH), or for the piece. */
  pieceMinutes: Scalars['Int']['output'];
  /** For waits: the temperature the figure is for, in tenths of a degree Celsius. */
  referenceTenthsC?: Maybe<Scalars['Int']['output']>;
  /** What it is done to. */
  scope: StepScope;
  /** Minutes before the first piece; 0 for waits. */
  setupMinutes: Scalars['Int']['output'];
  /** The skill they need; null for none. */
  skill?: Maybe<Scalars['String']['output']>;
  /** For waits: whose figure it is, such as the glue's name. */
  source?: Maybe<Scalars['String']['output']>;
  /** The stage it belongs to. */
  stage: Place;
  /** The station it needs; null for none. */
  station?: Maybe<Scalars['String']['output']>;
  /** What it keeps occupied beyond its own end. */
  takes: Array<StepTake>;
  /** What one does, as in "2 to glue"; empty for waits. */
  verb: Scalars['String']['output'];
};

/** A display in the shop that may look and nothing else. */
export type Screen = {
  __typename?: 'Screen';
  /** The screen's id. */
  id: Scalars['ID']['output'];
  /** When it last asked for something. */
  lastSeenAt?: Maybe<Scalars['DateTime']['output']>;
  /** The name people gave it. */
  name: Scalars['String']['output'];
  /** When it was paired. */
  pairedAt: Scalars['DateTime']['output'];
};

export type ScreensPayload = {
  __typename?: 'ScreensPayload';
  /** Why it did not work. */
  problems: Array<Problem>;
  /** The screens. */
  screens: Array<Screen>;
};

/** One signed-in browser of the person. */
export type Session = {
  __typename?: 'Session';
  /** When it was signed in. */
  createdAt: Scalars['DateTime']['output'];
  /** Whether this is the session that asks. */
  current: Scalars['Boolean']['output'];
  /** What the browser said of itself, shortened. */
  device: Scalars['String']['output'];
  /** The session's id. */
  id: Scalars['ID']['output'];
  /** When it was last used, to the minute. */
  lastSeenAt: Scalars['DateTime']['output'];
};

export type SessionsPayload = {
  __typename?: 'SessionsPayload';
  /** Why it did not work. */
  problems: Array<Problem>;
  /** The sessions that are left. */
  sessions: Array<Session>;
};

/** The shop as its people set it up. */
export type Shop = {
  __typename?: 'Shop';
  /** The latest reading of temperature and humidity, if there is one. */
  air?: Maybe<AirReading>;
  /** The clamps by length class, shortest first. */
  clamps: Array<ClampClass>;
  /** The currency, ISO 4217. */
  currency: Scalars['String']['output'];
  /** Dated exceptions, by date. */
  exceptions: Array<HoursException>;
  /** The shop's id. */
  id: Scalars['ID']['output'];
  /** Whether this is the demo shop. */
  isDemo: Scalars['Boolean']['output'];
  /** How lengths are shown. */
  lengthUnit: LengthUnit;
  /** The name. */
  name: Scalars['String']['output'];
  /** The glues and finishes. */
  profiles: Array<Profile>;
  /** The stations. */
  stations: Array<Station>;
  /** The version that a change must name. */
  version: Scalars['Int']['output'];
  /** Weekly hours, seven lists of spans, Monday first. */
  weekly: Array<Array<HourSpan>>;
  /** The IANA time zone. */
  zone: Scalars['String']['output'];
};

/** A shop that the signed-in person belongs to. */
export type ShopMembership = {
  __typename?: 'ShopMembership';
  /** The shop's name. */
  name: Scalars['String']['output'];
  /** The person's roles there. */
  roles: Array<Role>;
  /** The shop's id. */
  shopId: Scalars['ID']['output'];
};

export type ShopPayload = {
  __typename?: 'ShopPayload';
  /** Why it did not work. */
  problems: Array<Problem>;
  /** The shop after the change, or as it stands when the change was refused. */
  shop?: Maybe<Shop>;
};

export type SignInPayload = {
  __typename?: 'SignInPayload';
  /** Why it did not work. */
  problems: Array<Problem>;
  /** The person, when it worked. */
  viewer?: Maybe<Viewer>;
};

export type SignUpInput = {
  /** The owner's e-mail address. */
  email: Scalars['String']['input'];
  /** The owner's name, 1 to 80 characters. */
  name: Scalars['String']['input'];
  /** A password of at least 8 characters. */
  password: Scalars['String']['input'];
  /** The new shop's name, 1 to 80 characters. */
  shopName: Scalars['String']['input'];
  /** The shop's IANA time zone, such as Europe/Vienna. */
  zone: Scalars['String']['input'];
};

/** A place where work is done. */
export type Station = {
  __typename?: 'Station';
  /** How many of them it takes at once. */
  capacity: Scalars['Int']['output'];
  /** The key that route steps name, such as planer. */
  key: Scalars['String']['output'];
  /** The name people use. */
  name: Scalars['String']['output'];
  /** What the capacity counts. */
  unit: StationUnit;
};

/** What a station's capacity counts. */
export type StationUnit =
  /** Whole batches. */
  | 'BATCH'
  /** Boards. */
  | 'BOARD'
  /** Panels, or blocks, each as one. */
  | 'PIECE';

export type StepCommandInput = {
  /** The batch. */
  batchId: Scalars['ID']['input'];
  /** When it happened; null for now. */
  happenedAt?: InputMaybe<Scalars['DateTime']['input']>;
  /** Set to cut a running hold short. */
  override?: InputMaybe<OverrideInput>;
  /** Panel or block numbers from 1; [0] when the step is the whole batch's. */
  pieces: Array<Scalars['Int']['input']>;
  /** The step's key. */
  step: Scalars['String']['input'];
  /** The version of it that the person saw. */
  version: Scalars['Int']['input'];
};

/** Whether a step is work or waiting. */
export type StepKind =
  /** Waiting that no one can shorten. */
  | 'WAIT'
  /** Work that someone does. */
  | 'WORK';

/** One piece of work or of waiting on one piece of a batch, as far as it has gone. Steps that nobody has touched have no entry. */
export type StepRun = {
  __typename?: 'StepRun';
  /** When a wait was cut short by an override. */
  cutAt?: Maybe<Scalars['DateTime']['output']>;
  /** Who overrode it. */
  cutBy?: Maybe<Scalars['ID']['output']>;
  /** When the work ended. */
  finishedAt?: Maybe<Scalars['DateTime']['output']>;
  /** Who ended it. */
  finishedBy?: Maybe<Scalars['ID']['output']>;
  /** The panel's or block's number from 1; 0 when the step is the whole batch's. */
  piece: Scalars['Int']['output'];
  /** When the work began. */
  startedAt?: Maybe<Scalars['DateTime']['output']>;
  /** Who began it. */
  startedBy?: Maybe<Scalars['ID']['output']>;
  /** The step's key in the batch's route. */
  step: Scalars['String']['output'];
};

/** What a step is done to. */
export type StepScope =
  /** The whole batch at once. */
  | 'BATCH'
  /** Each block by itself. */
  | 'BLOCK'
  /** Each panel by itself. */
  | 'PANEL';

/** Something that a step takes at its start and that a later step gives back. */
export type StepTake = {
  __typename?: 'StepTake';
  /** A station's key, or CLAMPS. */
  resource: Scalars['String']['output'];
  /** The key of the step whose finish gives it back. */
  until: Scalars['String']['output'];
};

/** One strip of a panel, as the swatch and the lay-up show it. */
export type Strip = {
  __typename?: 'Strip';
  /** The species' key, such as maple. */
  species: Scalars['String']['output'];
  /** The strip's finished width. */
  width: Scalars['Length']['output'];
};

export type StripInput = {
  /** The species' key. */
  species: Scalars['String']['input'];
  /** The strip's finished width. */
  width: Scalars['Length']['input'];
};

export type Subscription = {
  __typename?: 'Subscription';
  /** What changes on the floor after the given place; without one, from now on. */
  floorChanges: FloorChange;
  /** Ticks about every ten seconds while the connection lives, with the server's clock. */
  heartbeat: Scalars['DateTime']['output'];
};


export type SubscriptionFloorChangesArgs = {
  after?: InputMaybe<Scalars['Cursor']['input']>;
};

/** The last command on a batch, while it can be undone. */
export type UndoableCommand = {
  __typename?: 'UndoableCommand';
  /** Who did it. */
  by?: Maybe<Scalars['ID']['output']>;
  /** The event's number. */
  event: Scalars['Int']['output'];
  /** Until when it can be undone. */
  until: Scalars['DateTime']['output'];
};

/** A batch for which no plan was found. */
export type UnplannedBatch = {
  __typename?: 'UnplannedBatch';
  /** The batch's id. */
  batchId: Scalars['ID']['output'];
  /** Why, in words. */
  reason: Scalars['String']['output'];
};

/** An override the owner has to hear of. */
export type UnseenOverride = {
  __typename?: 'UnseenOverride';
  /** The batch's code. */
  batchCode: Scalars['String']['output'];
  /** The override. */
  override: HoldOverride;
  /** What was done, in words. */
  sentence: Scalars['String']['output'];
};

/** The person who is signed in, and the shop they look at. */
export type Viewer = {
  __typename?: 'Viewer';
  /** The person's e-mail address. */
  email: Scalars['String']['output'];
  /** The member of the current shop that this person is. */
  member: Member;
  /** The current shop. */
  shop: Shop;
  /** All shops this person belongs to. */
  shops: Array<ShopMembership>;
};



export type ResolverTypeWrapper<T> = Promise<T> | T;


export type ResolverWithResolve<TResult, TParent, TContext, TArgs> = {
  resolve: ResolverFn<TResult, TParent, TContext, TArgs>;
};
export type Resolver<TResult, TParent = Record<PropertyKey, never>, TContext = Record<PropertyKey, never>, TArgs = Record<PropertyKey, never>> = ResolverFn<TResult, TParent, TContext, TArgs> | ResolverWithResolve<TResult, TParent, TContext, TArgs>;

export type ResolverFn<TResult, TParent, TContext, TArgs> = (
  parent: TParent,
  args: TArgs,
  context: TContext,
  info: GraphQLResolveInfo
) => Promise<TResult> | TResult;

export type SubscriptionSubscribeFn<TResult, TParent, TContext, TArgs> = (
  parent: TParent,
  args: TArgs,
  context: TContext,
  info: GraphQLResolveInfo
) => AsyncIterable<TResult> | Promise<AsyncIterable<TResult>>;

export type SubscriptionResolveFn<TResult, TParent, TContext, TArgs> = (
  parent: TParent,
  args: TArgs,
  context: TContext,
  info: GraphQLResolveInfo
) => TResult | Promise<TResult>;

export interface SubscriptionSubscriberObject<TResult, TKey extends string, TParent, TContext, TArgs> {
  subscribe: SubscriptionSubscribeFn<{ [key in TKey]: TResult }, TParent, TContext, TArgs>;
  resolve?: SubscriptionResolveFn<TResult, { [key in TKey]: TResult }, TContext, TArgs>;
}

export interface SubscriptionResolverObject<TResult, TParent, TContext, TArgs> {
  subscribe: SubscriptionSubscribeFn<any, TParent, TContext, TArgs>;
  resolve: SubscriptionResolveFn<TResult, any, TContext, TArgs>;
}

export type SubscriptionObject<TResult, TKey extends string, TParent, TContext, TArgs> =
  | SubscriptionSubscriberObject<TResult, TKey, TParent, TContext, TArgs>
  | SubscriptionResolverObject<TResult, TParent, TContext, TArgs>;

export type SubscriptionResolver<TResult, TKey extends string, TParent = Record<PropertyKey, never>, TContext = Record<PropertyKey, never>, TArgs = Record<PropertyKey, never>> =
  | ((...args: any[]) => SubscriptionObject<TResult, TKey, TParent, TContext, TArgs>)
  | SubscriptionObject<TResult, TKey, TParent, TContext, TArgs>;

export type TypeResolveFn<TTypes, TParent = Record<PropertyKey, never>, TContext = Record<PropertyKey, never>> = (
  parent: TParent,
  context: TContext,
  info: GraphQLResolveInfo
) => Maybe<TTypes> | Promise<Maybe<TTypes>>;

export type IsTypeOfResolverFn<T = Record<PropertyKey, never>, TContext = Record<PropertyKey, never>> = (obj: T, context: TContext, info: GraphQLResolveInfo) => boolean | Promise<boolean>;

export type NextResolverFn<T> = () => Promise<T>;

export type DirectiveResolverFn<TResult = Record<PropertyKey, never>, TParent = Record<PropertyKey, never>, TContext = Record<PropertyKey, never>, TArgs = Record<PropertyKey, never>> = (
  next: NextResolverFn<TResult>,
  parent: TParent,
  args: TArgs,
  context: TContext,
  info: GraphQLResolveInfo
) => TResult | Promise<TResult>;





/** Mapping between all available schema types and the resolvers types */
export type ResolversTypes = {
  AirReading: ResolverTypeWrapper<AirReading>;
  ApiKey: ResolverTypeWrapper<ApiKey>;
  ApiKeyPayload: ResolverTypeWrapper<ApiKeyPayload>;
  ApiScope: ApiScope;
  Batch: ResolverTypeWrapper<Batch>;
  BatchEvent: ResolverTypeWrapper<BatchEvent>;
  BatchEventPage: ResolverTypeWrapper<BatchEventPage>;
  BatchPayload: ResolverTypeWrapper<BatchPayload>;
  Boolean: ResolverTypeWrapper<Scalars['Boolean']['output']>;
  ClampClass: ResolverTypeWrapper<ClampClass>;
  ClampClassInput: ClampClassInput;
  ClampNeed: ResolverTypeWrapper<ClampNeed>;
  CreateBatchInput: CreateBatchInput;
  CreateOrderInput: CreateOrderInput;
  Cursor: ResolverTypeWrapper<Scalars['Cursor']['output']>;
  Customer: ResolverTypeWrapper<Customer>;
  Date: ResolverTypeWrapper<Scalars['Date']['output']>;
  DateTime: ResolverTypeWrapper<Scalars['DateTime']['output']>;
  Design: ResolverTypeWrapper<Design>;
  DesignInput: DesignInput;
  DesignPayload: ResolverTypeWrapper<DesignPayload>;
  Floor: ResolverTypeWrapper<Floor>;
  FloorChange: ResolverTypeWrapper<FloorChange>;
  Forecast: ResolverTypeWrapper<Forecast>;
  HoldKind: HoldKind;
  HoldOverride: ResolverTypeWrapper<HoldOverride>;
  HourSpan: ResolverTypeWrapper<HourSpan>;
  HourSpanInput: HourSpanInput;
  HoursException: ResolverTypeWrapper<HoursException>;
  HoursExceptionInput: HoursExceptionInput;
  ID: ResolverTypeWrapper<Scalars['ID']['output']>;
  Int: ResolverTypeWrapper<Scalars['Int']['output']>;
  Length: ResolverTypeWrapper<Scalars['Length']['output']>;
  LengthUnit: LengthUnit;
  Member: ResolverTypeWrapper<Member>;
  MoveBatchInput: MoveBatchInput;
  Mutation: ResolverTypeWrapper<Record<PropertyKey, never>>;
  Occupation: ResolverTypeWrapper<Occupation>;
  Order: ResolverTypeWrapper<Order>;
  OrderLine: ResolverTypeWrapper<OrderLine>;
  OrderLineInput: OrderLineInput;
  OrderPage: ResolverTypeWrapper<OrderPage>;
  OrderPayload: ResolverTypeWrapper<OrderPayload>;
  OrderStatus: OrderStatus;
  OverrideInput: OverrideInput;
  PageInfo: ResolverTypeWrapper<PageInfo>;
  Pairing: ResolverTypeWrapper<Pairing>;
  PairingAnswer: ResolverTypeWrapper<PairingAnswer>;
  PairingState: PairingState;
  Place: Place;
  Plan: ResolverTypeWrapper<Plan>;
  PlannedStep: ResolverTypeWrapper<PlannedStep>;
  Problem: ResolverTypeWrapper<Problem>;
  Profile: ResolverTypeWrapper<Profile>;
  ProfileKind: ProfileKind;
  Query: ResolverTypeWrapper<Record<PropertyKey, never>>;
  Role: Role;
  Route: ResolverTypeWrapper<Route>;
  RouteStep: ResolverTypeWrapper<RouteStep>;
  Screen: ResolverTypeWrapper<Screen>;
  ScreensPayload: ResolverTypeWrapper<ScreensPayload>;
  Session: ResolverTypeWrapper<Session>;
  SessionsPayload: ResolverTypeWrapper<SessionsPayload>;
  Shop: ResolverTypeWrapper<Shop>;
  ShopMembership: ResolverTypeWrapper<ShopMembership>;
  ShopPayload: ResolverTypeWrapper<ShopPayload>;
  SignInPayload: ResolverTypeWrapper<SignInPayload>;
  SignUpInput: SignUpInput;
  Station: ResolverTypeWrapper<Station>;
  StationUnit: StationUnit;
  StepCommandInput: StepCommandInput;
  StepKind: StepKind;
  StepRun: ResolverTypeWrapper<StepRun>;
  StepScope: StepScope;
  StepTake: ResolverTypeWrapper<StepTake>;
  String: ResolverTypeWrapper<Scalars['String']['output']>;
  Strip: ResolverTypeWrapper<Strip>;
  StripInput: StripInput;
  Subscription: ResolverTypeWrapper<Record<PropertyKey, never>>;
  UndoableCommand: ResolverTypeWrapper<UndoableCommand>;
  UnplannedBatch: ResolverTypeWrapper<UnplannedBatch>;
  UnseenOverride: ResolverTypeWrapper<UnseenOverride>;
  Viewer: ResolverTypeWrapper<Viewer>;
};

/** Mapping between all available schema types and the resolvers parents */
export type ResolversParentTypes = {
  AirReading: AirReading;
  ApiKey: ApiKey;
  ApiKeyPayload: ApiKeyPayload;
  Batch: Batch;
  BatchEvent: BatchEvent;
  BatchEventPage: BatchEventPage;
  BatchPayload: BatchPayload;
  Boolean: Scalars['Boolean']['output'];
  ClampClass: ClampClass;
  ClampClassInput: ClampClassInput;
  ClampNeed: ClampNeed;
  CreateBatchInput: CreateBatchInput;
  CreateOrderInput: CreateOrderInput;
  Cursor: Scalars['Cursor']['output'];
  Customer: Customer;
  Date: Scalars['Date']['output'];
  DateTime: Scalars['DateTime']['output'];
  Design: Design;
  DesignInput: DesignInput;
  DesignPayload: DesignPayload;
  Floor: Floor;
  FloorChange: FloorChange;
  Forecast: Forecast;
  HoldOverride: HoldOverride;
  HourSpan: HourSpan;
  HourSpanInput: HourSpanInput;
  HoursException: HoursException;
  HoursExceptionInput: HoursExceptionInput;
  ID: Scalars['ID']['output'];
  Int: Scalars['Int']['output'];
  Length: Scalars['Length']['output'];
  Member: Member;
  MoveBatchInput: MoveBatchInput;
  Mutation: Record<PropertyKey, never>;
  Occupation: Occupation;
  Order: Order;
  OrderLine: OrderLine;
  OrderLineInput: OrderLineInput;
  OrderPage: OrderPage;
  OrderPayload: OrderPayload;
  OverrideInput: OverrideInput;
  PageInfo: PageInfo;
  Pairing: Pairing;
  PairingAnswer: PairingAnswer;
  Plan: Plan;
  PlannedStep: PlannedStep;
  Problem: Problem;
  Profile: Profile;
  Query: Record<PropertyKey, never>;
  Route: Route;
  RouteStep: RouteStep;
  Screen: Screen;
  ScreensPayload: ScreensPayload;
  Session: Session;
  SessionsPayload: SessionsPayload;
  Shop: Shop;
  ShopMembership: ShopMembership;
  ShopPayload: ShopPayload;
  SignInPayload: SignInPayload;
  SignUpInput: SignUpInput;
  Station: Station;
  StepCommandInput: StepCommandInput;
  StepRun: StepRun;
  StepTake: StepTake;
  String: Scalars['String']['output'];
  Strip: Strip;
  StripInput: StripInput;
  Subscription: Record<PropertyKey, never>;
  UndoableCommand: UndoableCommand;
  UnplannedBatch: UnplannedBatch;
  UnseenOverride: UnseenOverride;
  Viewer: Viewer;
};

export type AirReadingResolvers<ContextType = Context, ParentType extends ResolversParentTypes['AirReading'] = ResolversParentTypes['AirReading']> = {
  at?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  humidityPercent?: Resolver<Maybe<ResolversTypes['Int']>, ParentType, ContextType>;
  temperatureTenthsC?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type ApiKeyResolvers<ContextType = Context, ParentType extends ResolversParentTypes['ApiKey'] = ResolversParentTypes['ApiKey']> = {
  createdAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  expiresAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  lastFour?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  lastUsedAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  prefix?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  revokedAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  scopes?: Resolver<Array<ResolversTypes['ApiScope']>, ParentType, ContextType>;
};

export type ApiKeyPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['ApiKeyPayload'] = ResolversParentTypes['ApiKeyPayload']> = {
  apiKey?: Resolver<Maybe<ResolversTypes['ApiKey']>, ParentType, ContextType>;
  key?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
};

export type BatchResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Batch'] = ResolversParentTypes['Batch']> = {
  assignedTo?: Resolver<Maybe<ResolversTypes['ID']>, ParentType, ContextType>;
  blocks?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  boards?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  code?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  designId?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  dueDate?: Resolver<Maybe<ResolversTypes['Date']>, ParentType, ContextType>;
  forecast?: Resolver<Maybe<ResolversTypes['Forecast']>, ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  occupations?: Resolver<Array<ResolversTypes['Occupation']>, ParentType, ContextType>;
  overrides?: Resolver<Array<ResolversTypes['HoldOverride']>, ParentType, ContextType>;
  panels?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  place?: Resolver<ResolversTypes['Place'], ParentType, ContextType>;
  releasedAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  routeId?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  runs?: Resolver<Array<ResolversTypes['StepRun']>, ParentType, ContextType>;
  shipBy?: Resolver<Maybe<ResolversTypes['Date']>, ParentType, ContextType>;
  shippedAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  undo?: Resolver<Maybe<ResolversTypes['UndoableCommand']>, ParentType, ContextType>;
  version?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type BatchEventResolvers<ContextType = Context, ParentType extends ResolversParentTypes['BatchEvent'] = ResolversParentTypes['BatchEvent']> = {
  by?: Resolver<Maybe<ResolversTypes['ID']>, ParentType, ContextType>;
  happenedAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  recordedAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  sentence?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  seq?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  type?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type BatchEventPageResolvers<ContextType = Context, ParentType extends ResolversParentTypes['BatchEventPage'] = ResolversParentTypes['BatchEventPage']> = {
  nodes?: Resolver<Array<ResolversTypes['BatchEvent']>, ParentType, ContextType>;
  pageInfo?: Resolver<ResolversTypes['PageInfo'], ParentType, ContextType>;
};

export type BatchPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['BatchPayload'] = ResolversParentTypes['BatchPayload']> = {
  batch?: Resolver<Maybe<ResolversTypes['Batch']>, ParentType, ContextType>;
  event?: Resolver<Maybe<ResolversTypes['Int']>, ParentType, ContextType>;
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
};

export type ClampClassResolvers<ContextType = Context, ParentType extends ResolversParentTypes['ClampClass'] = ResolversParentTypes['ClampClass']> = {
  count?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  key?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  length?: Resolver<ResolversTypes['Length'], ParentType, ContextType>;
};

export type ClampNeedResolvers<ContextType = Context, ParentType extends ResolversParentTypes['ClampNeed'] = ResolversParentTypes['ClampNeed']> = {
  count?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  length?: Resolver<ResolversTypes['Length'], ParentType, ContextType>;
};

export interface CursorScalarConfig extends GraphQLScalarTypeConfig<ResolversTypes['Cursor'], any> {
  name: 'Cursor';
}

export type CustomerResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Customer'] = ResolversParentTypes['Customer']> = {
  email?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export interface DateScalarConfig extends GraphQLScalarTypeConfig<ResolversTypes['Date'], any> {
  name: 'Date';
}

export interface DateTimeScalarConfig extends GraphQLScalarTypeConfig<ResolversTypes['DateTime'], any> {
  name: 'DateTime';
}

export type DesignResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Design'] = ResolversParentTypes['Design']> = {
  blockClamps?: Resolver<ResolversTypes['ClampNeed'], ParentType, ContextType>;
  blocksPerBoard?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  length?: Resolver<ResolversTypes['Length'], ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  panelBoards?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  panelClamps?: Resolver<ResolversTypes['ClampNeed'], ParentType, ContextType>;
  panelCount?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  slices?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  strips?: Resolver<Array<ResolversTypes['Strip']>, ParentType, ContextType>;
  thickness?: Resolver<ResolversTypes['Length'], ParentType, ContextType>;
  version?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  width?: Resolver<ResolversTypes['Length'], ParentType, ContextType>;
};

export type DesignPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['DesignPayload'] = ResolversParentTypes['DesignPayload']> = {
  design?: Resolver<Maybe<ResolversTypes['Design']>, ParentType, ContextType>;
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
};

export type FloorResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Floor'] = ResolversParentTypes['Floor']> = {
  batches?: Resolver<Array<ResolversTypes['Batch']>, ParentType, ContextType>;
  cursor?: Resolver<ResolversTypes['Cursor'], ParentType, ContextType>;
  designs?: Resolver<Array<ResolversTypes['Design']>, ParentType, ContextType>;
  members?: Resolver<Array<ResolversTypes['Member']>, ParentType, ContextType>;
  now?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  routes?: Resolver<Array<ResolversTypes['Route']>, ParentType, ContextType>;
  shop?: Resolver<ResolversTypes['Shop'], ParentType, ContextType>;
  watchers?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type FloorChangeResolvers<ContextType = Context, ParentType extends ResolversParentTypes['FloorChange'] = ResolversParentTypes['FloorChange']> = {
  batches?: Resolver<Array<ResolversTypes['Batch']>, ParentType, ContextType>;
  by?: Resolver<Maybe<ResolversTypes['ID']>, ParentType, ContextType>;
  cursor?: Resolver<ResolversTypes['Cursor'], ParentType, ContextType>;
  now?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  reset?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  shopChanged?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  watchers?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type ForecastResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Forecast'] = ResolversParentTypes['Forecast']> = {
  nextStartAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  readyAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  slackDays?: Resolver<Maybe<ResolversTypes['Int']>, ParentType, ContextType>;
  slackMinutes?: Resolver<Maybe<ResolversTypes['Int']>, ParentType, ContextType>;
};

export type HoldOverrideResolvers<ContextType = Context, ParentType extends ResolversParentTypes['HoldOverride'] = ResolversParentTypes['HoldOverride']> = {
  at?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  by?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  piece?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  reason?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  seen?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  step?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type HourSpanResolvers<ContextType = Context, ParentType extends ResolversParentTypes['HourSpan'] = ResolversParentTypes['HourSpan']> = {
  fromMinute?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  toMinute?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type HoursExceptionResolvers<ContextType = Context, ParentType extends ResolversParentTypes['HoursException'] = ResolversParentTypes['HoursException']> = {
  date?: Resolver<ResolversTypes['Date'], ParentType, ContextType>;
  reason?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  spans?: Resolver<Array<ResolversTypes['HourSpan']>, ParentType, ContextType>;
};

export interface LengthScalarConfig extends GraphQLScalarTypeConfig<ResolversTypes['Length'], any> {
  name: 'Length';
}

export type MemberResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Member'] = ResolversParentTypes['Member']> = {
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  initials?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  roles?: Resolver<Array<ResolversTypes['Role']>, ParentType, ContextType>;
  skills?: Resolver<Array<ResolversTypes['String']>, ParentType, ContextType>;
  weekly?: Resolver<Maybe<Array<Array<ResolversTypes['HourSpan']>>>, ParentType, ContextType>;
};

export type MutationResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Mutation'] = ResolversParentTypes['Mutation']> = {
  assignBatch?: Resolver<ResolversTypes['BatchPayload'], ParentType, ContextType, RequireFields<MutationAssignBatchArgs, 'batchId' | 'version'>>;
  createApiKey?: Resolver<ResolversTypes['ApiKeyPayload'], ParentType, ContextType, RequireFields<MutationCreateApiKeyArgs, 'name' | 'scopes'>>;
  createBatch?: Resolver<ResolversTypes['BatchPayload'], ParentType, ContextType, RequireFields<MutationCreateBatchArgs, 'input'>>;
  createDesign?: Resolver<ResolversTypes['DesignPayload'], ParentType, ContextType, RequireFields<MutationCreateDesignArgs, 'input'>>;
  createOrder?: Resolver<ResolversTypes['OrderPayload'], ParentType, ContextType, RequireFields<MutationCreateOrderArgs, 'input'>>;
  endOtherSessions?: Resolver<ResolversTypes['SessionsPayload'], ParentType, ContextType>;
  endSession?: Resolver<ResolversTypes['SessionsPayload'], ParentType, ContextType, RequireFields<MutationEndSessionArgs, 'id'>>;
  finishStep?: Resolver<ResolversTypes['BatchPayload'], ParentType, ContextType, RequireFields<MutationFinishStepArgs, 'input'>>;
  moveBatch?: Resolver<ResolversTypes['BatchPayload'], ParentType, ContextType, RequireFields<MutationMoveBatchArgs, 'input'>>;
  pairScreen?: Resolver<ResolversTypes['ScreensPayload'], ParentType, ContextType, RequireFields<MutationPairScreenArgs, 'code' | 'name'>>;
  ping?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  pollPairing?: Resolver<ResolversTypes['PairingAnswer'], ParentType, ContextType, RequireFields<MutationPollPairingArgs, 'secret'>>;
  revokeApiKey?: Resolver<ResolversTypes['ApiKeyPayload'], ParentType, ContextType, RequireFields<MutationRevokeApiKeyArgs, 'id'>>;
  revokeScreen?: Resolver<ResolversTypes['ScreensPayload'], ParentType, ContextType, RequireFields<MutationRevokeScreenArgs, 'id'>>;
  seeOverride?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType, RequireFields<MutationSeeOverrideArgs, 'id'>>;
  setClamps?: Resolver<ResolversTypes['ShopPayload'], ParentType, ContextType, RequireFields<MutationSetClampsArgs, 'clamps' | 'version'>>;
  setHours?: Resolver<ResolversTypes['ShopPayload'], ParentType, ContextType, RequireFields<MutationSetHoursArgs, 'exceptions' | 'version' | 'weekly'>>;
  signIn?: Resolver<ResolversTypes['SignInPayload'], ParentType, ContextType, RequireFields<MutationSignInArgs, 'email' | 'password'>>;
  signOut?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  signUp?: Resolver<ResolversTypes['SignInPayload'], ParentType, ContextType, RequireFields<MutationSignUpArgs, 'input'>>;
  startPairing?: Resolver<ResolversTypes['Pairing'], ParentType, ContextType>;
  startStep?: Resolver<ResolversTypes['BatchPayload'], ParentType, ContextType, RequireFields<MutationStartStepArgs, 'input'>>;
  switchShop?: Resolver<ResolversTypes['SignInPayload'], ParentType, ContextType, RequireFields<MutationSwitchShopArgs, 'shopId'>>;
  undoCommand?: Resolver<ResolversTypes['BatchPayload'], ParentType, ContextType, RequireFields<MutationUndoCommandArgs, 'batchId' | 'event'>>;
};

export type OccupationResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Occupation'] = ResolversParentTypes['Occupation']> = {
  amount?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  isClamps?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  piece?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  resource?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  since?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  step?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type OrderResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Order'] = ResolversParentTypes['Order']> = {
  clientReference?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  code?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  createdAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  customer?: Resolver<Maybe<ResolversTypes['Customer']>, ParentType, ContextType>;
  dueDate?: Resolver<ResolversTypes['Date'], ParentType, ContextType>;
  forecastReadyAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  lines?: Resolver<Array<ResolversTypes['OrderLine']>, ParentType, ContextType>;
  onTime?: Resolver<Maybe<ResolversTypes['Boolean']>, ParentType, ContextType>;
  progressPercent?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  shipBy?: Resolver<ResolversTypes['Date'], ParentType, ContextType>;
  stage?: Resolver<Maybe<ResolversTypes['Place']>, ParentType, ContextType>;
  status?: Resolver<ResolversTypes['OrderStatus'], ParentType, ContextType>;
  version?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type OrderLineResolvers<ContextType = Context, ParentType extends ResolversParentTypes['OrderLine'] = ResolversParentTypes['OrderLine']> = {
  batchCodes?: Resolver<Array<ResolversTypes['String']>, ParentType, ContextType>;
  count?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  designId?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  designName?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  forecastReadyAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  progressPercent?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  stage?: Resolver<Maybe<ResolversTypes['Place']>, ParentType, ContextType>;
  status?: Resolver<ResolversTypes['OrderStatus'], ParentType, ContextType>;
};

export type OrderPageResolvers<ContextType = Context, ParentType extends ResolversParentTypes['OrderPage'] = ResolversParentTypes['OrderPage']> = {
  nodes?: Resolver<Array<ResolversTypes['Order']>, ParentType, ContextType>;
  pageInfo?: Resolver<ResolversTypes['PageInfo'], ParentType, ContextType>;
  totalCount?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type OrderPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['OrderPayload'] = ResolversParentTypes['OrderPayload']> = {
  order?: Resolver<Maybe<ResolversTypes['Order']>, ParentType, ContextType>;
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
};

export type PageInfoResolvers<ContextType = Context, ParentType extends ResolversParentTypes['PageInfo'] = ResolversParentTypes['PageInfo']> = {
  endCursor?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  hasNextPage?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
};

export type PairingResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Pairing'] = ResolversParentTypes['Pairing']> = {
  code?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  expiresAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  secret?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type PairingAnswerResolvers<ContextType = Context, ParentType extends ResolversParentTypes['PairingAnswer'] = ResolversParentTypes['PairingAnswer']> = {
  state?: Resolver<ResolversTypes['PairingState'], ParentType, ContextType>;
  token?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
};

export type PlanResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Plan'] = ResolversParentTypes['Plan']> = {
  madeAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  seq?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  steps?: Resolver<Array<ResolversTypes['PlannedStep']>, ParentType, ContextType>;
  unplanned?: Resolver<Array<ResolversTypes['UnplannedBatch']>, ParentType, ContextType>;
  version?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
};

export type PlannedStepResolvers<ContextType = Context, ParentType extends ResolversParentTypes['PlannedStep'] = ResolversParentTypes['PlannedStep']> = {
  batchId?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  endAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  members?: Resolver<Array<ResolversTypes['ID']>, ParentType, ContextType>;
  piece?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  reason?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  startAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  step?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type ProblemResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Problem'] = ResolversParentTypes['Problem']> = {
  code?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  field?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  sentence?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type ProfileResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Profile'] = ResolversParentTypes['Profile']> = {
  isDefault?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  key?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  kind?: Resolver<ResolversTypes['ProfileKind'], ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  note?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type QueryResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Query'] = ResolversParentTypes['Query']> = {
  apiKeys?: Resolver<Array<ResolversTypes['ApiKey']>, ParentType, ContextType>;
  batch?: Resolver<Maybe<ResolversTypes['Batch']>, ParentType, ContextType, RequireFields<QueryBatchArgs, 'code'>>;
  batchHistory?: Resolver<ResolversTypes['BatchEventPage'], ParentType, ContextType, RequireFields<QueryBatchHistoryArgs, 'batchId' | 'first'>>;
  designs?: Resolver<Array<ResolversTypes['Design']>, ParentType, ContextType>;
  floor?: Resolver<ResolversTypes['Floor'], ParentType, ContextType>;
  members?: Resolver<Array<ResolversTypes['Member']>, ParentType, ContextType>;
  now?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  order?: Resolver<Maybe<ResolversTypes['Order']>, ParentType, ContextType, RequireFields<QueryOrderArgs, 'code'>>;
  orders?: Resolver<ResolversTypes['OrderPage'], ParentType, ContextType, RequireFields<QueryOrdersArgs, 'first'>>;
  plan?: Resolver<Maybe<ResolversTypes['Plan']>, ParentType, ContextType>;
  screens?: Resolver<Array<ResolversTypes['Screen']>, ParentType, ContextType>;
  sessions?: Resolver<Array<ResolversTypes['Session']>, ParentType, ContextType>;
  shop?: Resolver<ResolversTypes['Shop'], ParentType, ContextType>;
  unseenOverrides?: Resolver<Array<ResolversTypes['UnseenOverride']>, ParentType, ContextType>;
  viewer?: Resolver<Maybe<ResolversTypes['Viewer']>, ParentType, ContextType>;
};

export type RouteResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Route'] = ResolversParentTypes['Route']> = {
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  steps?: Resolver<Array<ResolversTypes['RouteStep']>, ParentType, ContextType>;
};

export type RouteStepResolvers<ContextType = Context, ParentType extends ResolversParentTypes['RouteStep'] = ResolversParentTypes['RouteStep']> = {
  after?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  caution?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  hold?: Resolver<Maybe<ResolversTypes['HoldKind']>, ParentType, ContextType>;
  key?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  kind?: Resolver<ResolversTypes['StepKind'], ParentType, ContextType>;
  maxMinutes?: Resolver<Maybe<ResolversTypes['Int']>, ParentType, ContextType>;
  minMinutes?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  pausable?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  people?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  pieceMinutes?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  referenceTenthsC?: Resolver<Maybe<ResolversTypes['Int']>, ParentType, ContextType>;
  scope?: Resolver<ResolversTypes['StepScope'], ParentType, ContextType>;
  setupMinutes?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  skill?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  source?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  stage?: Resolver<ResolversTypes['Place'], ParentType, ContextType>;
  station?: Resolver<Maybe<ResolversTypes['String']>, ParentType, ContextType>;
  takes?: Resolver<Array<ResolversTypes['StepTake']>, ParentType, ContextType>;
  verb?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type ScreenResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Screen'] = ResolversParentTypes['Screen']> = {
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  lastSeenAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  pairedAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
};

export type ScreensPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['ScreensPayload'] = ResolversParentTypes['ScreensPayload']> = {
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
  screens?: Resolver<Array<ResolversTypes['Screen']>, ParentType, ContextType>;
};

export type SessionResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Session'] = ResolversParentTypes['Session']> = {
  createdAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
  current?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  device?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  lastSeenAt?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
};

export type SessionsPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['SessionsPayload'] = ResolversParentTypes['SessionsPayload']> = {
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
  sessions?: Resolver<Array<ResolversTypes['Session']>, ParentType, ContextType>;
};

export type ShopResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Shop'] = ResolversParentTypes['Shop']> = {
  air?: Resolver<Maybe<ResolversTypes['AirReading']>, ParentType, ContextType>;
  clamps?: Resolver<Array<ResolversTypes['ClampClass']>, ParentType, ContextType>;
  currency?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  exceptions?: Resolver<Array<ResolversTypes['HoursException']>, ParentType, ContextType>;
  id?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  isDemo?: Resolver<ResolversTypes['Boolean'], ParentType, ContextType>;
  lengthUnit?: Resolver<ResolversTypes['LengthUnit'], ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  profiles?: Resolver<Array<ResolversTypes['Profile']>, ParentType, ContextType>;
  stations?: Resolver<Array<ResolversTypes['Station']>, ParentType, ContextType>;
  version?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  weekly?: Resolver<Array<Array<ResolversTypes['HourSpan']>>, ParentType, ContextType>;
  zone?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type ShopMembershipResolvers<ContextType = Context, ParentType extends ResolversParentTypes['ShopMembership'] = ResolversParentTypes['ShopMembership']> = {
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  roles?: Resolver<Array<ResolversTypes['Role']>, ParentType, ContextType>;
  shopId?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
};

export type ShopPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['ShopPayload'] = ResolversParentTypes['ShopPayload']> = {
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
  shop?: Resolver<Maybe<ResolversTypes['Shop']>, ParentType, ContextType>;
};

export type SignInPayloadResolvers<ContextType = Context, ParentType extends ResolversParentTypes['SignInPayload'] = ResolversParentTypes['SignInPayload']> = {
  problems?: Resolver<Array<ResolversTypes['Problem']>, ParentType, ContextType>;
  viewer?: Resolver<Maybe<ResolversTypes['Viewer']>, ParentType, ContextType>;
};

export type StationResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Station'] = ResolversParentTypes['Station']> = {
  capacity?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  key?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  name?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  unit?: Resolver<ResolversTypes['StationUnit'], ParentType, ContextType>;
};

export type StepRunResolvers<ContextType = Context, ParentType extends ResolversParentTypes['StepRun'] = ResolversParentTypes['StepRun']> = {
  cutAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  cutBy?: Resolver<Maybe<ResolversTypes['ID']>, ParentType, ContextType>;
  finishedAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  finishedBy?: Resolver<Maybe<ResolversTypes['ID']>, ParentType, ContextType>;
  piece?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  startedAt?: Resolver<Maybe<ResolversTypes['DateTime']>, ParentType, ContextType>;
  startedBy?: Resolver<Maybe<ResolversTypes['ID']>, ParentType, ContextType>;
  step?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type StepTakeResolvers<ContextType = Context, ParentType extends ResolversParentTypes['StepTake'] = ResolversParentTypes['StepTake']> = {
  resource?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  until?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type StripResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Strip'] = ResolversParentTypes['Strip']> = {
  species?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  width?: Resolver<ResolversTypes['Length'], ParentType, ContextType>;
};

export type SubscriptionResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Subscription'] = ResolversParentTypes['Subscription']> = {
  floorChanges?: SubscriptionResolver<ResolversTypes['FloorChange'], "floorChanges", ParentType, ContextType, Partial<SubscriptionFloorChangesArgs>>;
  heartbeat?: SubscriptionResolver<ResolversTypes['DateTime'], "heartbeat", ParentType, ContextType>;
};

export type UndoableCommandResolvers<ContextType = Context, ParentType extends ResolversParentTypes['UndoableCommand'] = ResolversParentTypes['UndoableCommand']> = {
  by?: Resolver<Maybe<ResolversTypes['ID']>, ParentType, ContextType>;
  event?: Resolver<ResolversTypes['Int'], ParentType, ContextType>;
  until?: Resolver<ResolversTypes['DateTime'], ParentType, ContextType>;
};

export type UnplannedBatchResolvers<ContextType = Context, ParentType extends ResolversParentTypes['UnplannedBatch'] = ResolversParentTypes['UnplannedBatch']> = {
  batchId?: Resolver<ResolversTypes['ID'], ParentType, ContextType>;
  reason?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type UnseenOverrideResolvers<ContextType = Context, ParentType extends ResolversParentTypes['UnseenOverride'] = ResolversParentTypes['UnseenOverride']> = {
  batchCode?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  override?: Resolver<ResolversTypes['HoldOverride'], ParentType, ContextType>;
  sentence?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
};

export type ViewerResolvers<ContextType = Context, ParentType extends ResolversParentTypes['Viewer'] = ResolversParentTypes['Viewer']> = {
  email?: Resolver<ResolversTypes['String'], ParentType, ContextType>;
  member?: Resolver<ResolversTypes['Member'], ParentType, ContextType>;
  shop?: Resolver<ResolversTypes['Shop'], ParentType, ContextType>;
  shops?: Resolver<Array<ResolversTypes['ShopMembership']>, ParentType, ContextType>;
};

export type Resolvers<ContextType = Context> = {
  AirReading?: AirReadingResolvers<ContextType>;
  ApiKey?: ApiKeyResolvers<ContextType>;
  ApiKeyPayload?: ApiKeyPayloadResolvers<ContextType>;
  Batch?: BatchResolvers<ContextType>;
  BatchEvent?: BatchEventResolvers<ContextType>;
  BatchEventPage?: BatchEventPageResolvers<ContextType>;
  BatchPayload?: BatchPayloadResolvers<ContextType>;
  ClampClass?: ClampClassResolvers<ContextType>;
  ClampNeed?: ClampNeedResolvers<ContextType>;
  Cursor?: GraphQLScalarType;
  Customer?: CustomerResolvers<ContextType>;
  Date?: GraphQLScalarType;
  DateTime?: GraphQLScalarType;
  Design?: DesignResolvers<ContextType>;
  DesignPayload?: DesignPayloadResolvers<ContextType>;
  Floor?: FloorResolvers<ContextType>;
  FloorChange?: FloorChangeResolvers<ContextType>;
  Forecast?: ForecastResolvers<ContextType>;
  HoldOverride?: HoldOverrideResolvers<ContextType>;
  HourSpan?: HourSpanResolvers<ContextType>;
  HoursException?: HoursExceptionResolvers<ContextType>;
  Length?: GraphQLScalarType;
  Member?: MemberResolvers<ContextType>;
  Mutation?: MutationResolvers<ContextType>;
  Occupation?: OccupationResolvers<ContextType>;
  Order?: OrderResolvers<ContextType>;
  OrderLine?: OrderLineResolvers<ContextType>;
  OrderPage?: OrderPageResolvers<ContextType>;
  OrderPayload?: OrderPayloadResolvers<ContextType>;
  PageInfo?: PageInfoResolvers<ContextType>;
  Pairing?: PairingResolvers<ContextType>;
  PairingAnswer?: PairingAnswerResolvers<ContextType>;
  Plan?: PlanResolvers<ContextType>;
  PlannedStep?: PlannedStepResolvers<ContextType>;
  Problem?: ProblemResolvers<ContextType>;
  Profile?: ProfileResolvers<ContextType>;
  Query?: QueryResolvers<ContextType>;
  Route?: RouteResolvers<ContextType>;
  RouteStep?: RouteStepResolvers<ContextType>;
  Screen?: ScreenResolvers<ContextType>;
  ScreensPayload?: ScreensPayloadResolvers<ContextType>;
  Session?: SessionResolvers<ContextType>;
  SessionsPayload?: SessionsPayloadResolvers<ContextType>;
  Shop?: ShopResolvers<ContextType>;
  ShopMembership?: ShopMembershipResolvers<ContextType>;
  ShopPayload?: ShopPayloadResolvers<ContextType>;
  SignInPayload?: SignInPayloadResolvers<ContextType>;
  Station?: StationResolvers<ContextType>;
  StepRun?: StepRunResolvers<ContextType>;
  StepTake?: StepTakeResolvers<ContextType>;
  Strip?: StripResolvers<ContextType>;
  Subscription?: SubscriptionResolvers<ContextType>;
  UndoableCommand?: UndoableCommandResolvers<ContextType>;
  UnplannedBatch?: UnplannedBatchResolvers<ContextType>;
  UnseenOverride?: UnseenOverrideResolvers<ContextType>;
  Viewer?: ViewerResolvers<ContextType>;
};

