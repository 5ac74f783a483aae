import { type PartReference, studyEndpoints as studies } from '../contract/study.ts';
import { workspaceEndpoints } from '../contract/workspace.ts';
import { etagOf } from '../http/if-match.ts';
import { exampleStudy } from './example-study.ts';
import type { TestAnswer, TestBrowser } from './test-browser.ts';

/** What is sent for a working copy; `inputs` may be wrong on purpose. */
type Content = {
  inputs: object;
  pending?: Record<string, unknown>;
  parts?: Partial<PartReference>[];
  message?: string;
};

/** Calls about studies, as one browser makes them in one workspace. */
export class StudyCalls {
  readonly browser: TestBrowser;
  readonly workspaceId: string;

  constructor(browser: TestBrowser, workspaceId: string) {
    this.browser = browser;
    this.workspaceId = workspaceId;
  }

  create(content: Content = { inputs: exampleStudy() }, headers?: Record<string, string>): Promise<TestAnswer> {
    return this.browser.call(studies.createStudy, { params: this.inWorkspace(), body: content as never, headers });
  }

  /** Makes a study and gives its id. @throws if the server refuses it */
  async begin(inputs: object = exampleStudy()): Promise<string> {
    const made = await this.create({ inputs });
    if (made.status !== 201) throw new Error(`createStudy answered ${made.status}: ${JSON.stringify(made.body)}`);
    return (made.body as { id: string }).id;
  }

  /** The activity log of the workspace, newest first. */
  async deeds(): Promise<unknown[]> {
    const listed = await this.browser.call(workspaceEndpoints.listActivity, { params: this.inWorkspace() });
    return (listed.body as { items: unknown[] }).items;
  }

  read(studyId: string): Promise<TestAnswer> {
    return this.browser.call(studies.readStudy, { params: this.of(studyId) });
  }

  /** @param version  of the working copy that it is made from */
  write(studyId: string, version: number, content: Content): Promise<TestAnswer> {
    const headers = { 'If-Match': etagOf('w', version) };
    return this.browser.call(studies.writeWorkingCopy, { params: this.of(studyId), body: content as never, headers });
  }

  save(studyId: string, version: number, message = 'Warmer', own?: Record<string, string>): Promise<TestAnswer> {
    const headers = { 'If-Match': etagOf('w', version), ...own };
    return this.browser.call(studies.saveRevision, { params: this.of(studyId), body: { message }, headers });
  }

  copy(studyId: string, body: { title?: string; revision?: number } = {}): Promise<TestAnswer> {
    return this.browser.call(studies.copyStudy, { params: this.of(studyId), body });
  }

  archive(studyId: string): Promise<TestAnswer> {
    return this.browser.call(studies.archiveStudy, { params: this.of(studyId) });
  }

  unarchive(studyId: string): Promise<TestAnswer> {
    return this.browser.call(studies.unarchiveStudy, { params: this.of(studyId) });
  }

  revisions(studyId: string, query: Record<string, string> = {}): Promise<TestAnswer> {
    return this.browser.call(studies.listStudyRevisions, { params: this.of(studyId), query });
  }

  revision(studyId: string, revision: number): Promise<TestAnswer> {
    return this.browser.call(studies.readStudyRevision, { params: { ...this.of(studyId), revision } });
  }

  list(query: Record<string, string> = {}): Promise<TestAnswer> {
    return this.browser.call(studies.listStudies, { params: this.inWorkspace(), query });
  }

  private inWorkspace() {
    return { workspaceId: this.workspaceId };
  }

  private of(studyId: string) {
    return { workspaceId: this.workspaceId, studyId };
  }
}
