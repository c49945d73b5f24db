import { type Role } from '@brakeven/contract';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { Shell } from '../pages/shell';
import { SignInPage } from '../pages/sign-in-page';
import { findSignIn } from './sign-ins';

const FLAGS = [
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];
const isRoot = process.getuid?.() === 0;

export interface VisitOptions {
  widthPx?: number;
  theme?: 'light' | 'dark';
}

/** What an API request was answered with. */
export interface Answer {
  path: string;
  status: number;
  body: string;
}

/** One person at one browser, with everything that went wrong or was sent to them. */
export interface Visitor {
  page: Page;
  context: BrowserContext;
  /** Errors of the console, refusals of the content security policy among them, and uncaught exceptions. */
  complaints: string[];
  /** Waits for the bodies still on their way; only of answers in JSON. */
  listAnswers(): Promise<Answer[]>;
}

/** Debian's chromium, and a signed-in state for each role, so that a suite signs in once a role. */
export class Visitors {
  private readonly states = new Map<Role, Awaited<ReturnType<BrowserContext['storageState']>>>();

  private constructor(private readonly browser: Browser) {}

  static async launch(): Promise<Visitors> {
    const args = isRoot ? [...FLAGS, '--no-sandbox'] : FLAGS;
    return new Visitors(await chromium.launch({ executablePath: '/usr/bin/chromium', args }));
  }

  async close(): Promise<void> {
    await this.browser.close();
  }

  /** A browser in which nobody is signed in. */
  async visit(options: VisitOptions = {}): Promise<Visitor> {
    return this.open(options);
  }

  /** A browser in which somebody of this role is signed in, at no page yet. */
  async visitAs(role: Role, options: VisitOptions = {}): Promise<Visitor> {
    const state = this.states.get(role) ?? (await this.signIn(role));
    return this.open(options, state);
  }

  private async signIn(role: Role) {
    const { page, context } = await this.open({});
    const { email, password } = findSignIn(role);
    await new SignInPage(page).open();
    await new SignInPage(page).signIn(email, password);
    await new Shell(page).waitUntilShown();
    const state = await context.storageState();
    this.states.set(role, state);
    await context.close();
    return state;
  }

  private async open(
    { widthPx = 1440, theme = 'light' }: VisitOptions,
    storageState?: Awaited<ReturnType<BrowserContext['storageState']>>,
  ): Promise<Visitor> {
    const context = await this.browser.newContext({
      baseURL: findAddress(),
      viewport: { width: widthPx, height: 900 },
      colorScheme: theme,
      locale: 'en-US',
      reducedMotion: 'reduce',
      ...(storageState && { storageState }),
    });
    context.setDefaultTimeout(60_000);
    const page = await context.newPage();
    return { page, context, complaints: listenForComplaints(page), listAnswers: listenForAnswers(page) };
  }
}

function findAddress(): string {
  const address = process.env['E2E_ADDRESS'];
  if (!address)
    throw new Error('The application is not started. Run the journeys with: npm test -- --only e2e');
  return address;
}

function listenForComplaints(page: Page): string[] {
  const complaints: string[] = [];
  page.on('console', (message) => {
    const { url } = message.location();
    // Asking who is signed in, before anybody is, is answered 401, which the browser itself writes down.
    const isFirstQuestion = url.endsWith('/api/session') && message.text().includes('401');
    if (message.type() === 'error' && !isFirstQuestion) complaints.push(`${message.text()} ${url}`);
  });
  page.on('pageerror', (error) => complaints.push(String(error)));
  return complaints;
}

function listenForAnswers(page: Page): () => Promise<Answer[]> {
  const answers: Promise<Answer>[] = [];
  page.on('response', (response) => {
    const { pathname, search } = new URL(response.url());
    const isJson = /json/.test(response.headers()['content-type'] ?? '');
    if (!pathname.startsWith('/api/') || !isJson) return;
    // A body is gone once the page has been left before it was read: then nobody has seen it either.
    const body = response.text().catch(() => '');
    answers.push(body.then((text) => ({ path: pathname + search, status: response.status(), body: text })));
  });
  return () => Promise.all(answers);
}
