import type { Section, SectionShape } from '../schemas/frameDocument.ts';
import { fromMillimetres } from '../units/quantities.ts';

/**
 * Outer corner radius of a cold-formed hollow section by EN 10219-2, all in mm: 2T up to 6 mm, 2.5T up to
 * 10 mm, 3T above; the inner one is smaller by T.
 */
export function coldFormedRadius(wall: number): number {
  if (wall <= 6) return 2 * wall;
  return wall <= 10 ? 2.5 * wall : 3 * wall;
}

/** Square hollow section, cold formed, side and wall in mm. */
export function squareTube(side: number, wall: number): Section {
  return named(`SHS ${side}×${wall}`, tube(side, side, wall));
}

/** Rectangular hollow section, cold formed, height (along z), width and wall in mm. */
export function rectangularTubeSection(height: number, width: number, wall: number): Section {
  return named(`RHS ${height}×${width}×${wall}`, tube(height, width, wall));
}

/** Circular hollow section, outer diameter and wall in mm. */
export function roundTubeSection(diameter: number, wall: number): Section {
  return named(`CHS ${diameter}×${wall}`, {
    kind: 'round-tube',
    diameter: fromMillimetres(diameter),
    wall: fromMillimetres(wall),
  });
}

/** Rolled I-section, dimensions in mm as the tables of the European profiles give them. */
function rolled(
  name: string,
  height: number,
  width: number,
  web: number,
  flange: number,
  radius: number,
): Section {
  return named(name, {
    kind: 'i-section',
    width: fromMillimetres(width),
    height: fromMillimetres(height),
    web: fromMillimetres(web),
    flange: fromMillimetres(flange),
    radius: fromMillimetres(radius),
  });
}

function tube(height: number, width: number, wall: number): SectionShape {
  return {
    kind: 'rectangular-tube',
    width: fromMillimetres(width),
    height: fromMillimetres(height),
    wall: fromMillimetres(wall),
    radius: fromMillimetres(coldFormedRadius(wall)),
  };
}

/** The id is the name with what ids may not hold replaced: “SHS 100×5” becomes “SHS 100x5”. */
function named(name: string, shape: SectionShape): Section {
  return { id: name.replaceAll('×', 'x'), name, shape };
}

/** Sections a frame is commonly built of, from light to heavy within each family. A fresh list per call. */
export function sectionShelf(): Section[] {
  return [
    squareTube(40, 3),
    squareTube(50, 3),
    squareTube(60, 4),
    squareTube(80, 4),
    squareTube(80, 5),
    squareTube(100, 4),
    squareTube(100, 5),
    squareTube(100, 6),
    squareTube(120, 5),
    squareTube(120, 6),
    squareTube(120, 8),
    squareTube(150, 6),
    squareTube(150, 8),
    squareTube(200, 8),
    rectangularTubeSection(60, 40, 3),
    rectangularTubeSection(80, 40, 4),
    rectangularTubeSection(100, 50, 4),
    rectangularTubeSection(120, 60, 5),
    rectangularTubeSection(120, 80, 6),
    rectangularTubeSection(160, 80, 6),
    rectangularTubeSection(200, 100, 8),
    roundTubeSection(48.3, 3.2),
    roundTubeSection(60.3, 4),
    roundTubeSection(88.9, 4),
    roundTubeSection(114.3, 5),
    rolled('IPE 100', 100, 55, 4.1, 5.7, 7),
    rolled('IPE 160', 160, 82, 5, 7.4, 9),
    rolled('IPE 200', 200, 100, 5.6, 8.5, 12),
    rolled('HEA 100', 96, 100, 5, 8, 12),
    rolled('HEA 160', 152, 160, 6, 9, 15),
    rolled('HEA 200', 190, 200, 6.5, 10, 18),
  ];
}
