import { runCommand } from '#server/command-line/run-command.ts';
import { createCompute } from '#server/compute/compute.ts';
import { parseConfig, requireDatabaseUrl } from '#server/config.ts';
import { openOrm } from '#server/db/orm.ts';
import { seedDemo } from '#server/db/seeders/demo/seed-demo.ts';

await runCommand(async () => {
  const config = parseConfig(process.env);
  const orm = await openOrm({ databaseUrl: requireDatabaseUrl(config), poolSize: 1 });
  const { compute, close } = createCompute({ threads: 1 });
  try {
    const { passwordCost } = config;
    const clock = () => new Date();
    const made = await seedDemo({ em: orm.em.fork(), compute, clock, passwordCost });
    if (made > 0) process.stdout.write(`Made the demo of the Lowmoor Beam Hall: ${made} cases.\n`);
  } finally {
    await close();
    await orm.close(true);
  }
});
