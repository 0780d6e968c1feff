import type {EpochAccount, GeodeticPosition, InputAccount, Notice, PerAxis} from './result.ts';

/** What is in one or several joined logs, `stillmark.contents/1`: no average, no verdict. */
export interface ContentsResult {
  readonly schema: 'stillmark.contents/1';
  readonly program: {readonly name: 'stillmark'; readonly version: string};
  readonly inputs: readonly InputAccount[];
  readonly epochs: EpochAccount;
  /** The periods during which the receiver stood; `--stand N` of `reduce` takes the N-th. */
  readonly standing: readonly Standing[];
  readonly satellites: readonly SystemSummary[];
  readonly rejectedLines: readonly RejectedExample[];
  readonly notices: readonly Notice[];
}

export interface Standing {
  readonly number: number;
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly durationS: number;
  readonly epochs: number;
  readonly mean: GeodeticPosition;
  /** Plain standard deviations of the single epochs, nothing screened but invalid fixes. */
  readonly scatterM: PerAxis<number | null>;
}

export interface SystemSummary {
  readonly system: string;
  /** Different satellites seen over the whole record. */
  readonly satellites: number;
  readonly medianCarrierToNoiseDbHz: number | null;
}

export interface RejectedExample {
  readonly input: string;
  readonly lineNumber: number;
  readonly reason: string;
  readonly excerpt: string;
}
