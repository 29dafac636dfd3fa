/** Where test databases are cloned; `urls` hold the word DATABASE in place of the name. */
export interface TestAccess {
  adminUrl: string
  template: string
  urls: { appUrl: string; ownerUrl: string }
}

export interface TestDatabases extends TestAccess {
  env: { TEST_DATABASE: string }
  release(): Promise<void>
}

export function startTestDatabases(options?: { clean?: boolean }): Promise<TestDatabases>
export function cloneTemplate(
  access: Pick<TestAccess, 'adminUrl' | 'template'>,
  label: string,
): Promise<string>
