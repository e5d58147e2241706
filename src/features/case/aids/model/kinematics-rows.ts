import type { KinematicsRow, KinematicsTable } from '#shared/contracts/aids.ts';
import { fullDigits } from '#shared/units/format.ts';

export interface KinematicsColumn {
  key: string;
  /** Heading with its unit, for reading. */
  name: string;
  /** Name and unit for files. */
  file: [string, string];
  value: (way: KinematicsRow) => number | null;
}

/** Columns of the table; those of the partner are left out for a fixed centre, which has none. */
export function kinematicsColumns({ unit, rows }: KinematicsTable): KinematicsColumn[] {
  const angle = unit.angle === 'deg' ? '°' : unit.angle;
  const moves = rows.some(({ ways }) => ways.some(({ recoilAngle }) => recoilAngle !== null));
  const column = (
    key: keyof KinematicsRow,
    name: string,
    fileName: string,
    fileUnit: string,
  ): KinematicsColumn => ({ key, name, file: [fileName, fileUnit], value: (way) => way[key] });
  const all = [
    column('thetaCm', `θ cm (${angle})`, 'theta cm', unit.angle),
    column('thetaLab', `θ lab (${angle})`, 'theta lab', unit.angle),
    column('recoilAngle', `recoil angle, lab (${angle})`, 'recoil angle lab', unit.angle),
    column('projectileEnergy', `projectile (${unit.energy})`, 'projectile energy', unit.energy),
    column('recoilEnergy', `recoil (${unit.energy})`, 'recoil energy', unit.energy),
    column('kept', 'K', 'K', '1'),
    column('jacobian', 'dΩ cm / dΩ lab', 'dOmega cm per dOmega lab', '1'),
  ];
  return moves ? all : all.filter(({ key }) => key !== 'recoilAngle' && key !== 'recoilEnergy');
}

export interface KinematicsLine {
  key: string;
  /** The way, or the angle that no way leads to. */
  way: KinematicsRow | null;
  theta: number;
}

/** One line a way; an angle that cannot be reached keeps its line. */
export function kinematicsLines({ rows }: KinematicsTable): KinematicsLine[] {
  return rows.flatMap(({ theta, ways }, index): KinematicsLine[] => {
    if (ways.length === 0) return [{ key: `${index}`, way: null, theta }];
    const ordered = [...ways].sort((a, b) => a.thetaCm - b.thetaCm);
    return ordered.map((way, branch) => ({ key: `${index}.${branch}`, way, theta }));
  });
}

/** Names, units, then all digits; an unreachable angle has only itself. */
export function kinematicsRows(table: KinematicsTable): string[][] {
  const columns = kinematicsColumns(table);
  const number = (value: number | null) => (value === null ? '' : fullDigits(value));
  return [
    ['asked angle', ...columns.map(({ file }) => file[0])],
    [table.unit.angle, ...columns.map(({ file }) => file[1])],
    ...kinematicsLines(table).map(({ theta, way }) => [
      number(theta),
      ...columns.map(({ value }) => (way === null ? '' : number(value(way)))),
    ]),
  ];
}
