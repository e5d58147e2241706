import { createUserSchema } from '#shared/contracts/users.ts';
import { ask } from '#server/command-line/ask.ts';
import { CommandError, runCommand } from '#server/command-line/run-command.ts';
import { parseConfig, requireDatabaseUrl } from '#server/config.ts';
import { openOrm } from '#server/db/orm.ts';
import { validate } from '#server/http/validate.ts';
import { createUser } from '#server/modules/users/create-user.ts';

/** Asks for the password twice where a person types it. */
async function askPassword(): Promise<string> {
  const question = { variable: 'ADMIN_PASSWORD', secret: true };
  const [first = ''] = await ask([
    { ...question, prompt: 'Password (at least 12 characters, not shown): ' },
  ]);
  if (!process.stdin.isTTY || process.env['ADMIN_PASSWORD']) return first;
  const [second] = await ask([{ ...question, prompt: 'The same again: ' }]);
  if (first !== second) throw new CommandError('The two passwords differ; nothing was made.');
  return first;
}

await runCommand(async () => {
  const config = parseConfig(process.env);
  const orm = await openOrm({ databaseUrl: requireDatabaseUrl(config), poolSize: 1 });
  try {
    const about = [
      { prompt: 'E-mail address: ', variable: 'ADMIN_EMAIL' },
      { prompt: 'Name: ', variable: 'ADMIN_NAME' },
    ];
    const interactive = process.stdin.isTTY;
    const [email, name, piped] = await ask(
      interactive ? about : [...about, { prompt: '', variable: 'ADMIN_PASSWORD', secret: true }],
    );
    const password = piped ?? (await askPassword());
    const input = validate(createUserSchema, { email, name, password, role: 'administrator' });
    const context = { em: orm.em.fork(), now: new Date(), passwordCost: config.passwordCost };
    const account = await createUser({ ...context, actor: { name: 'admin:create' } }, input);
    process.stdout.write(
      `Made the administrator ${account.name} <${account.email}>; sign in with this address.\n`,
    );
  } finally {
    await orm.close(true);
  }
});
