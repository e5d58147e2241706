import { createInterface } from 'node:readline/promises';
import { Writable } from 'node:stream';
import { CommandError } from './run-command.ts';

export interface Question {
  /** Shown on a terminal. */
  prompt: string;
  /** Environment variable that answers it, for scripts. */
  variable: string;
  secret?: boolean;
}

async function fromTerminal({ prompt, secret }: Question): Promise<string> {
  const mute = new Writable({ write: (_chunk, _encoding, done) => done() });
  const lines = createInterface({
    input: process.stdin,
    output: secret ? mute : process.stdout,
    terminal: true,
  });
  let answered = false;
  try {
    if (secret) process.stdout.write(prompt);
    const gone = new Promise<never>((_resolve, reject) => {
      lines.once('close', () => {
        if (!answered) reject(new CommandError('Nothing was made.'));
      });
    });
    const answer = await Promise.race([lines.question(secret ? '' : prompt), gone]);
    answered = true;
    return answer;
  } finally {
    if (secret) process.stdout.write('\n');
    lines.close();
  }
}

async function linesOfStdin(): Promise<string[]> {
  let text = '';
  process.stdin.setEncoding('utf8');
  for await (const chunk of process.stdin) text += String(chunk);
  return text.split(/\r?\n/);
}

/**
 * Answers to questions in their order: from the environment where a variable is set, else typed on the terminal
 * (a secret without echo), else the next line of what is piped in.
 */
export async function ask(questions: readonly Question[]): Promise<string[]> {
  const answers: string[] = [];
  let piped: string[] | undefined;
  for (const question of questions) {
    const given = process.env[question.variable];
    if (given !== undefined && given !== '') {
      answers.push(given);
    } else if (process.stdin.isTTY) {
      answers.push(await fromTerminal(question));
    } else {
      piped ??= await linesOfStdin();
      const line = piped.shift();
      if (line === undefined || line === '') {
        throw new CommandError(
          `There is no terminal to ask on: set ${question.variable}, or pipe the answers in, one a line.`,
        );
      }
      answers.push(line);
    }
  }
  return answers;
}
