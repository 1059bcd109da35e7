// A page of Larkmoor's owner, wide enough for every column and new for each test.
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, beforeEach } from 'vitest';
import { launchBrowser, signedIn } from '../support/browser';
import { sharedApp } from '../support/shared-app';

export interface OwnersPage {
  owner: BrowserContext;
  page: Page;
}

/** @param take called before each test of the file that calls this, with what it has opened */
export function ownersPages(take: (opened: OwnersPage) => void): void {
  let browser: Browser;
  let owner: BrowserContext;
  beforeAll(async () => {
    browser = await launchBrowser();
    owner = await signedIn(browser, sharedApp(), 'owner@larkmoor.example', {
      viewport: { width: 1400, height: 900 },
    });
  });
  afterAll(() => browser.close());
  beforeEach(async () => {
    const page = await owner.newPage();
    take({ owner, page });
    return async () => page.close();
  });
}
