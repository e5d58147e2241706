import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { binariesFor, findBinaries } from '#scripts/lib/postgres/binaries.mjs';
import { findPlace, newHome } from '#scripts/lib/postgres/place.mjs';
import { tempFolder } from './temp-folder.ts';

describe('where the cluster lives', () => {
  test('in DATA_DIR when the account that runs it can get there', () => {
    expect(newHome('/srv/lab/.data', true)).toBe('/srv/lab/.data/postgres');
  });

  test('else below /var/lib, the same for the same DATA_DIR', () => {
    const none = () => false;
    const home = newHome('/root/lab/.data', false, none);
    expect(home).toMatch(/^\/var\/lib\/tallybarn-[0-9a-f]{12}$/);
    expect(newHome('/root/lab/.data', false, none)).toBe(home);
    expect(newHome('/root/other/.data', false, none)).not.toBe(home);
  });

  test('never in a folder that is already there: it is the data of an earlier DATA_DIR', () => {
    const first = newHome('/root/lab/.data', false, () => false);
    const taken = new Set([first, `${first}-2`]);
    expect(newHome('/root/lab/.data', false, (path) => taken.has(path))).toBe(`${first}-3`);
  });

  test('a recorded folder that is gone is refused, not made anew', () => {
    const dataDir = tempFolder();
    const home = join(dataDir, 'gone');
    writeFileSync(join(dataDir, 'cluster.json'), JSON.stringify({ home }));
    expect(() => findPlace(dataDir)).toThrow(`${home}, recorded in`);
  });
});

describe('which PostgreSQL', () => {
  function debian(...majors: number[]): string {
    const folder = tempFolder();
    for (const major of majors) {
      mkdirSync(join(folder, `${major}/bin`), { recursive: true });
      for (const name of ['postgres', 'initdb'])
        writeFileSync(join(folder, `${major}/bin`, name), '');
    }
    mkdirSync(join(folder, '18/lib'), { recursive: true }); // a client without a server
    return folder;
  }

  test('the newest one with a server, by number and not by letter', () => {
    expect(findBinaries(debian(9, 15, 13)).map(({ major }) => major)).toEqual([15, 13, 9]);
    expect(findBinaries(join(debian(), 'absent'))).toEqual([]);
  });

  test('a cluster is opened by the version that made it', () => {
    const data = tempFolder();
    writeFileSync(join(data, 'PG_VERSION'), '13\n');
    expect(binariesFor(findBinaries(debian(15, 13)), data).major).toBe(13);
    expect(binariesFor(findBinaries(debian(15, 13)), join(data, 'new')).major).toBe(15);
  });

  test('one of a version that is not here is left untouched, with the way out', () => {
    const data = tempFolder();
    writeFileSync(join(data, 'PG_VERSION'), '13\n');
    const open = () => binariesFor(findBinaries(debian(15)), data);
    expect(open).toThrow(/PostgreSQL 13, and this machine has PostgreSQL 15.*untouched/);
    expect(open).toThrow(
      expect.objectContaining({
        mend: expect.stringMatching(/pg_dump .*\n.*\n.*pg_restore/) as string,
      }),
    );
  });

  test('none at all names the command', () => {
    expect(() => binariesFor([], tempFolder())).toThrow('PostgreSQL is not installed');
  });
});
