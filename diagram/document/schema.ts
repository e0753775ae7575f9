import { z } from 'zod';

/**
 * The installation document: one home, at the level of conductors and terminals. Every screen, schedule, finding and
 * export is derived from it. Positions (`sheet`) are presentation: removing them changes no result.
 */

/** Keys that would reach an object's prototype; refused as ids everywhere. */
const FORBIDDEN = new Set(['__proto__', 'constructor', 'prototype']);

const text = (max: number) => z.string().max(max);
export const IdSchema = z
  .string()
  .min(1)
  .max(64)
  .regex(/^[A-Za-z0-9_.:-]+$/, 'an id is letters, digits and _ . : - only')
  .refine((id) => !FORBIDDEN.has(id), 'this id is reserved');

const positive = z.number().positive().finite();
const nonNegative = z.number().nonnegative().finite();
const fraction = z.number().gt(0).lte(1);

export const PracticeIdSchema = z.enum(['IEC', 'IN', 'GB']);
export const EarthingSystemSchema = z.enum(['TN-S', 'TN-C-S', 'TT']);
export const RoleSchema = z.enum(['line', 'switched', 'strapper', 'neutral', 'earth', 'dc+', 'dc-']);
export const MaterialSchema = z.enum(['Cu', 'Al']);
export const InsulationSchema = z.enum(['PVC', 'XLPE']);
export const MethodSchema = z.enum(['A1', 'A2', 'B1', 'B2', 'C', 'D1']);

export const SupplySchema = z.strictObject({
  system: EarthingSystemSchema,
  /** V, line to neutral */
  voltage: positive.max(1000),
  /** Hz */
  frequency: positive.max(1000),
  /** ohm, external earth fault loop impedance, TN */
  ze: nonNegative.optional(),
  /** ohm, the share of `ze` in the protective conductor; half of `ze` where not given */
  zeEarth: nonNegative.optional(),
  /** ohm, external line-neutral loop impedance */
  zln: positive.optional(),
  /** ohm, earth electrode resistance, TT */
  ra: positive.optional(),
});

export const PlaceKindSchema = z.enum(['intake', 'room', 'wet', 'passage', 'outdoor']);
export const PlaceSchema = z.strictObject({
  id: IdSchema,
  name: text(80),
  kind: PlaceKindSchema,
  /** zone of a room with a bath or shower, where the part of the room drawn lies in one */
  zone: z.union([z.literal(0), z.literal(1), z.literal(2)]).optional(),
  sleeping: z.boolean().optional(),
  ventilated: z.boolean().optional(),
});

/** What every part may carry besides its ratings. */
const common = {
  id: IdSchema,
  /** reference designation, IEC 81346: letter and number */
  ref: text(24).optional(),
  label: text(80).optional(),
  place: IdSchema.optional(),
  /** name of the switchboard or enclosure; place + board is one switchboard */
  board: text(40).optional(),
};
const rating = { /** A */ rating: positive.optional() };
const poles = { poles: z.union([z.literal(1), z.literal(2)]).optional() };
const contact = { state: z.enum(['closed', 'open']).optional() };
const curve = { curve: z.enum(['B', 'C', 'D']).optional(), /** A, rated breaking capacity */ icn: positive.optional() };
const residual = {
  /** A, rated residual operating current */
  sensitivity: positive.optional(),
  type: z.enum(['AC', 'A', 'F', 'B']).optional(),
  delay: z.enum(['none', 'S']).optional(),
};
const terminals = { count: z.int().positive().max(200).optional() };
const consumer = {
  /** W, running */
  watts: nonNegative.optional(),
  pf: fraction.optional(),
  /** start current as a multiple of running */
  surge: z.number().min(1).max(20).optional(),
  class: z.union([z.literal(1), z.literal(2)]).optional(),
  fixed: z.boolean().optional(),
};

const part = <K extends string, S extends z.ZodRawShape>(kind: K, shape: S) =>
  z.strictObject({ ...common, kind: z.literal(kind), ...shape });

export const PartSchema = z.discriminatedUnion('kind', [
  part('supply', {}),
  part('fuse', { ...rating, standard: z.enum(['gG', 'dc']).optional(), ...contact }),
  part('meter', { ...rating }),
  part('isolator', { ...poles, ...rating, ...contact }),
  part('mcb', { ...poles, ...rating, ...curve, ...contact, spare: z.boolean().optional() }),
  part('rcd', { ...rating, ...residual, ...contact }),
  part('rcbo', { ...poles, ...rating, ...curve, ...residual, ...contact, spare: z.boolean().optional() }),
  part('spd', { class: z.union([z.literal(1), z.literal(2), z.literal(3)]).optional() }),
  part('line-bar', { ...rating, ...terminals }),
  part('neutral-bar', { ...terminals }),
  part('earth-bar', { ...terminals }),
  part('joint', { ...terminals }),
  part('electrode', {}),
  part('changeover', { ...poles, ...rating, state: z.enum(['A', '0', 'B']).optional() }),
  part('inverter', {
    va: positive.optional(),
    /** VA, for a start */
    surge: positive.optional(),
    /** A dc, charging the bank */
    charge: nonNegative.optional(),
    efficiency: fraction.optional(),
    /** ms */
    transfer: nonNegative.optional(),
    neutral: z.enum(['through', 'separate']).optional(),
    /** joins out.N to out.E on battery */
    bond: z.boolean().optional(),
    /** V, at which the bank is taken as empty */
    cutoff: positive.optional(),
    state: z.enum(['on', 'off']).optional(),
    hoursWanted: nonNegative.max(72).optional(),
    /** A, prospective on battery; surge / voltage where not given */
    shortCircuit: positive.optional(),
  }),
  part('battery', {
    /** V and Ah of one battery; `arrangement` says how `count` of them are joined */
    volts: positive.optional(),
    ah: positive.optional(),
    /** h, the discharge time at which `ah` is stated; 20 where not given */
    hours: positive.optional(),
    chemistry: z.enum(['flooded', 'vrla', 'lfp']).optional(),
    count: z.int().positive().max(64).optional(),
    arrangement: z.enum(['series', 'parallel']).optional(),
  }),
  part('socket', {
    ...rating,
    pattern: text(40).optional(),
    /** W, assumed */
    load: nonNegative.optional(),
    switched: z.boolean().optional(),
    ...contact,
    class: z.union([z.literal(1), z.literal(2)]).optional(),
  }),
  part('plug', { /** id of the socket it stands in; absent while it hangs */ in: IdSchema.optional(), pattern: text(40).optional() }),
  part('switch', { ...rating, ...contact }),
  part('switch-2way', { ...rating, state: z.enum(['1', '2']).optional() }),
  part('switch-cross', { ...rating, state: z.enum(['straight', 'crossed']).optional() }),
  part('switch-2pole', { ...rating, ...contact }),
  part('regulator', { ...rating }),
  part('lamp', consumer),
  part('fan', consumer),
  part('appliance', consumer),
  part('bond', { to: text(40).optional() }),
]);

export const EndSchema = z.tuple([IdSchema, z.string().min(1).max(16)]);
export const WireSchema = z.strictObject({
  id: IdSchema,
  from: EndSchema,
  to: EndSchema,
  /** what the person drawing intends it to be; the engine decides from the graph what it is */
  role: RoleSchema,
  cable: IdSchema.optional(),
  /** IEC 60757 code: BN, BU, BK, RD, GNYE ... */
  colour: text(8).optional(),
});

export const CableSchema = z.strictObject({
  id: IdSchema,
  ref: text(24).optional(),
  /** mm2, live conductors */
  csa: positive.max(1000),
  /** mm2, protective conductor; `csa` where not given */
  cpc: positive.max(1000).optional(),
  material: MaterialSchema,
  insulation: InsulationSchema,
  method: MethodSchema,
  /** m, one way */
  length: nonNegative.max(10000),
  /** loaded circuits run together, this one counted */
  grouped: z.int().min(1).max(40).optional(),
  /** degC; the document's where not given */
  ambient: z.number().min(-40).max(80).optional(),
  cores: z.int().min(1).max(40).optional(),
});

export const NoticeSchema = z.strictObject({ place: IdSchema, board: text(40).optional(), text: text(300) });

/** A finding that somebody answers for: it is kept in the file and printed, not hidden. */
export const SilenceSchema = z.strictObject({
  rule: text(64),
  /** id of a part or wire the finding names */
  at: IdSchema,
  reason: z.string().min(1).max(500),
  by: z.string().min(1).max(80),
});

/** One row of the survey: what a room holds, and what of it must stay on in an outage. */
export const SurveyRoomSchema = z.strictObject({
  id: IdSchema,
  /** place in the table; rows are kept sorted by it */
  order: z.number().finite(),
  name: text(80),
  kind: z.enum(['room', 'sleeping', 'wet', 'passage', 'outdoor', 'intake']),
  lamps: z.int().min(0).max(60),
  /** W, each */
  lampWatts: nonNegative.max(2000),
  fans: z.int().min(0).max(20),
  fanWatts: nonNegative.max(1000),
  outlets: z.int().min(0).max(40),
  heavy: z.array(z.strictObject({ what: z.string().min(1).max(40), watts: positive.max(20000) })).max(8),
  /** what stays on: numbers of lamps and fans, W at one backed-up outlet (0: none) */
  keepLamps: z.int().min(0).max(60),
  keepFans: z.int().min(0).max(20),
  keepOutletWatts: nonNegative.max(3000),
  /** h wanted on battery */
  hours: nonNegative.max(72),
  /** m, the run from the board; the draft assumes 12 m where it is not given */
  run: positive.max(200).optional(),
});

/** 1/100 mm on paper, integers: `x` to the right, `y` down, from the face's own origin. */
export const PositionSchema = z.strictObject({
  x: z.int().min(-1_000_000).max(1_000_000),
  y: z.int().min(-1_000_000).max(1_000_000),
  /** quarter turns, clockwise */
  turn: z.union([z.literal(0), z.literal(1), z.literal(2), z.literal(3)]).optional(),
  /** set by hand: tidying leaves it where it is */
  pinned: z.boolean().optional(),
  /** held where it stands: no hand moves it until it is let go; what it is may still be changed */
  locked: z.literal(true).optional(),
});
const positions = z.record(IdSchema, PositionSchema);

/**
 * The plan of a storey: a picture of the job, behind a second arrangement of the same parts. Presentation only; it reaches
 * no result.
 */
export const FloorPlanSchema = z.strictObject({
  id: IdSchema,
  /** "Ground floor" */
  name: z.string().trim().min(1).max(60),
  /** id of the picture among those of the job */
  picture: IdSchema,
  /** 1/100 mm, the size at which the picture lies on the paper; its upper left corner is the origin of positions */
  width: z.int().min(1000).max(200_000),
  height: z.int().min(1000).max(200_000),
  /** two places on it and how far they are apart in the home: what makes a plan one that can be measured */
  scale: z
    .strictObject({
      a: z.strictObject({ x: PositionSchema.shape.x, y: PositionSchema.shape.y }),
      b: z.strictObject({ x: PositionSchema.shape.x, y: PositionSchema.shape.y }),
      /** m */
      metres: positive.max(1000),
    })
    .optional(),
});

/** Where a part stands on the plan of a storey; the other faces keep their own positions. */
export const PlanPositionSchema = PositionSchema.extend({
  /** id of the floor plan */
  on: IdSchema,
});

const coordinate = z.int().min(-1_000_000).max(1_000_000);

/** A line, 1/100 mm, along which a run goes a stretch because somebody led it there: upright at `x` or level at `y`. */
export const BendSchema = z.union([z.strictObject({ x: coordinate }), z.strictObject({ y: coordinate })]);
/** The face, and the first wire of the run. */
export const BendKeySchema = z
  .string()
  .max(80)
  .regex(/^(overview|connections):[A-Za-z0-9_.:-]+$/, 'bends are kept by face and wire, as overview:w1');
/** Lines of one run, in order from its first end; all else of its way is worked out. */
export const BendsSchema = z.array(BendSchema).min(1).max(24);

export const SheetSchema = z.strictObject({
  overview: positions.optional(),
  connections: positions.optional(),
  plan: z.record(IdSchema, PlanPositionSchema).optional(),
  bends: z.record(BendKeySchema, BendsSchema).optional(),
});

const uniqueIds = (list: readonly { id: string }[], path: string, ctx: z.RefinementCtx) => {
  const seen = new Set<string>();
  list.forEach(({ id }, i) => {
    if (seen.has(id)) ctx.addIssue({ code: 'custom', path: [path, i, 'id'], message: `the id "${id}" is used twice` });
    seen.add(id);
  });
};

export const MAX_PARTS = 20_000;
export const MAX_PLANS = 12;

export const DocumentSchema = z
  .strictObject({
    schema: z.literal(1),
    title: text(120),
    practice: PracticeIdSchema,
    supply: SupplySchema,
    /** degC, default for cables */
    ambient: z.number().min(-40).max(80),
    places: z.array(PlaceSchema).max(500),
    parts: z.array(PartSchema).max(MAX_PARTS),
    wires: z.array(WireSchema).max(4 * MAX_PARTS),
    cables: z.array(CableSchema).max(MAX_PARTS),
    notices: z.array(NoticeSchema).max(200).optional(),
    silenced: z.array(SilenceSchema).max(500).optional(),
    /** what each room is to hold: the draft is made from it and the sheet is compared with it */
    survey: z.array(SurveyRoomSchema).max(100).optional(),
    /** the plans of the storeys */
    plans: z.array(FloorPlanSchema).max(MAX_PLANS).optional(),
    sheet: SheetSchema.optional(),
  })
  .superRefine((doc, ctx) => {
    uniqueIds(doc.places, 'places', ctx);
    uniqueIds(doc.parts, 'parts', ctx);
    uniqueIds(doc.wires, 'wires', ctx);
    uniqueIds(doc.cables, 'cables', ctx);
    if (doc.survey) uniqueIds(doc.survey, 'survey', ctx);
    if (doc.plans) uniqueIds(doc.plans, 'plans', ctx);
  });

export type PracticeId = z.infer<typeof PracticeIdSchema>;
export type Supply = z.infer<typeof SupplySchema>;
export type Place = z.infer<typeof PlaceSchema>;
export type Part = z.infer<typeof PartSchema>;
export type Kind = Part['kind'];
export type PartOf<K extends Kind> = Extract<Part, { kind: K }>;
export type Role = z.infer<typeof RoleSchema>;
export type End = z.infer<typeof EndSchema>;
export type Wire = z.infer<typeof WireSchema>;
export type Cable = z.infer<typeof CableSchema>;
export type Notice = z.infer<typeof NoticeSchema>;
export type Silence = z.infer<typeof SilenceSchema>;
export type SurveyRoom = z.infer<typeof SurveyRoomSchema>;
export type Position = z.infer<typeof PositionSchema>;
export type FloorPlan = z.infer<typeof FloorPlanSchema>;
export type PlanPosition = z.infer<typeof PlanPositionSchema>;
export type Bend = z.infer<typeof BendSchema>;
export type Face = 'overview' | 'connections';
/** Whatever keeps positions of its own for the same parts: the two faces, and the floor plan. */
export const ARRANGEMENTS = ['overview', 'connections', 'plan'] as const satisfies readonly (Face | 'plan')[];
export type Arrangement = (typeof ARRANGEMENTS)[number];
export type Installation = z.infer<typeof DocumentSchema>;

/** A problem of a file: where it is and what is wrong with it, in words for the person who wrote it. */
export interface DocumentError {
  path: string;
  message: string;
}

/**
 * Reads unknown data as an installation document.
 * @returns the document in canonical order, or every problem found, with a path like `parts.3.rating`
 */
export function readDocument(data: unknown): { ok: true; document: Installation } | { ok: false; errors: DocumentError[] } {
  const result = DocumentSchema.safeParse(data);
  if (result.success) return { ok: true, document: canonical(result.data) };
  return {
    ok: false,
    errors: result.error.issues.map((issue) => ({ path: issue.path.join('.') || '(file)', message: issue.message })),
  };
}

/** Plain code-unit order: the same on every machine, unlike a locale's. */
export const byCode = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);
export const byId = (a: { id: string }, b: { id: string }): number => byCode(a.id, b.id);

/** An item of a list in order of id. */
export function findById<T extends { id: string }>(list: readonly T[], id: string): T | undefined {
  let low = 0;
  let high = list.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (list[middle]!.id < id) low = middle + 1;
    else high = middle;
  }
  return list[low]?.id === id ? list[low] : undefined;
}

const byOrder = (a: SurveyRoom, b: SurveyRoom): number => a.order - b.order || byId(a, b);

/** The list itself where it is in order, as it mostly is. */
function inOrder<T>(list: T[], compare: (a: T, b: T) => number): T[] {
  for (let i = 1; i < list.length; i++) if (compare(list[i - 1]!, list[i]!) > 0) return [...list].sort(compare);
  return list;
}

function sortedByKey<P>(places: Record<string, P>): Record<string, P> {
  const ids = Object.keys(places);
  const sorted = inOrder(ids, byCode);
  return sorted === ids ? places : Object.fromEntries(sorted.map((id) => [id, places[id]!]));
}

/**
 * The document in its one order: fields as declared, lists by id, survey rows by their place in the table, empty options
 * left out. The same home is the same bytes whatever the order of drawing.
 */
export function canonical(doc: Installation): Installation {
  const { overview, connections, plan, bends } = doc.sheet ?? {};
  const sheet = {
    ...(overview && Object.keys(overview).length > 0 && { overview: sortedByKey(overview) }),
    ...(connections && Object.keys(connections).length > 0 && { connections: sortedByKey(connections) }),
    ...(plan && Object.keys(plan).length > 0 && { plan: sortedByKey(plan) }),
    ...(bends && Object.keys(bends).length > 0 && { bends: sortedByKey(bends) }),
  };
  return {
    schema: 1,
    title: doc.title,
    practice: doc.practice,
    supply: doc.supply,
    ambient: doc.ambient,
    places: inOrder(doc.places, byId),
    parts: inOrder(doc.parts, byId),
    wires: inOrder(doc.wires, byId),
    cables: inOrder(doc.cables, byId),
    ...(doc.notices?.length && { notices: doc.notices }),
    ...(doc.silenced?.length && { silenced: doc.silenced }),
    ...(doc.survey?.length && { survey: inOrder(doc.survey, byOrder) }),
    ...(doc.plans?.length && { plans: inOrder(doc.plans, byId) }),
    ...(Object.keys(sheet).length > 0 && { sheet }),
  };
}

/** An empty home, as a new drawing begins. */
export function emptyDocument(title: string, practice: PracticeId, supply: Supply): Installation {
  return { schema: 1, title, practice, supply, ambient: 30, places: [], parts: [], wires: [], cables: [] };
}
