/**
 * Published deflection limits to pick from. Each names its source, its member, the load it is meant for, and how we know it:
 * `seen` = the value was read on a public page; `memory` = recalled, not confirmed. A limit without its load is meaningless,
 * and the code that governs decides: the pane says so wherever one is shown.
 */
export interface PublishedLimit {
  readonly source: string;
  readonly member: string;
  readonly load: string;
  /** the limit as the row language writes it; for a cantilever the divisor is of twice its length, as CHECK counts it */
  readonly limit: string;
  readonly status: 'seen' | 'memory';
}

const one = (
  source: string,
  member: string,
  load: string,
  divisor: number,
  status: PublishedLimit['status'] = 'seen',
): PublishedLimit => ({ source, member, load, limit: `span/${divisor}`, status });

export const PUBLISHED_LIMITS: readonly PublishedLimit[] = [
  one('IBC Table 1604.3', 'floor members', 'live', 360),
  one('IBC Table 1604.3', 'floor members', 'dead + live', 240),
  one('IBC Table 1604.3', 'roof, plaster ceiling', 'live, snow or wind', 360),
  one('IBC Table 1604.3', 'roof, plaster ceiling', 'dead + live', 240),
  one('IBC Table 1604.3', 'roof, ceiling not plaster', 'live, snow or wind', 240),
  one('IBC Table 1604.3', 'roof, ceiling not plaster', 'dead + live', 180),
  one('IBC Table 1604.3', 'roof without ceiling', 'live, snow or wind', 180),
  one('IBC Table 1604.3', 'roof without ceiling', 'dead + live', 120),
  one('IBC Table 1604.3', 'exterior wall, plaster', 'wind', 360),
  one('IBC Table 1604.3', 'exterior wall, other brittle finish', 'wind', 240),
  one('IBC Table 1604.3', 'exterior wall, flexible finish', 'wind', 120),
  one(
    'ACI 318-19 Table 24.2.2',
    'flat roof, nothing attached that is easily damaged',
    'live, immediate',
    180,
  ),
  one('ACI 318-19 Table 24.2.2', 'floor, nothing attached that is easily damaged', 'live, immediate', 360),
  one('ACI 318-19 Table 24.2.2', 'attached parts likely to be damaged', 'part after attachment', 480),
  one('ACI 318-19 Table 24.2.2', 'attached parts not likely to be damaged', 'part after attachment', 240),
  one('EN 1993-1-1, French annex', 'roof, general', 'total less camber', 200),
  one('EN 1993-1-1, French annex', 'floor, general', 'total less camber', 200),
  one('EN 1993-1-1, French annex', 'floor, general', 'variable', 300),
  one('EN 1993-1-1, French annex', 'floor with brittle parts', 'total less camber', 250),
  one('EN 1993-1-1, French annex', 'floor carrying columns', 'total less camber', 400),
  one('BS 5950-1 Table 8', 'beams with plaster or brittle finish', 'imposed', 360),
  one('BS 5950-1 Table 8', 'other beams', 'imposed', 200),
  one('BS 5950-1 Table 8', 'cantilevers (length/180)', 'imposed', 360),
  one('EN 1992-1-1 7.4.1', 'beams, slabs and cantilevers', 'quasi-permanent', 250),
  one('EN 1992-1-1 7.4.1', 'adjacent parts that may be damaged', 'after construction', 500),
  one('EN 1995-1-1 Table 7.2', 'timber on two supports', 'instantaneous, l/300 to l/500', 300, 'memory'),
  one('EN 1995-1-1 Table 7.2', 'timber on two supports', 'final net, l/250 to l/350', 250, 'memory'),
  one('IS 456 cl. 23.2', 'floors, roofs and other members', 'final, all causes', 250),
  one('IS 800:2007 Table 6', 'floor or roof, parts not easily cracked', 'live', 300, 'memory'),
  one('IS 800:2007 Table 6', 'floor or roof, parts easily cracked', 'live', 360, 'memory'),
  one('AS 4100 App. B', 'beams', 'total', 250, 'memory'),
  one('CSA S16 Annex D', 'floors', 'live', 300, 'memory'),
  one('CSA S16 Annex D', 'floors, brittle finish', 'live', 360, 'memory'),
  one('TMS 402', 'lintels and beams carrying masonry', 'total', 600, 'memory'),
  one('AASHTO LRFD 2.5.2.6.2 (optional)', 'bridge girders', 'vehicles with dynamic allowance', 800),
  one(
    'AASHTO LRFD 2.5.2.6.2 (optional)',
    'bridge girders with footway',
    'vehicles with dynamic allowance',
    1000,
  ),
  one('AASHTO LRFD 2.5.2.6.2 (optional)', 'timber bridge girders', 'vehicles', 425),
  one(
    'AISC Design Guide 3',
    'crane runway, light to moderate service',
    'wheel loads, vertical',
    600,
    'memory',
  ),
  one('AISC Design Guide 3', 'crane runway, heavy service', 'wheel loads, vertical', 800, 'memory'),
  one('AISC Design Guide 3', 'monorail', 'wheel loads', 450, 'memory'),
];
