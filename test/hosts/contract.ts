import { describeFiles } from './contractFiles.ts';
import { describeLoading } from './contractLoading.ts';
import { setStage } from './contractStage.ts';
import { describeStudies } from './contractStudies.ts';
import type { TestHost, TestHostOptions } from './testHost.ts';

/** Everything that both hosts must do alike, run over a host of either kind. */
export function describeHost(open: (options: TestHostOptions) => Promise<TestHost>): void {
  const stage = setStage(open);
  describeLoading(stage);
  describeFiles(stage);
  describeStudies(stage);
}
