import type {Notice, Severity} from './result.ts';

/** Makes the sentence of a notice from its code and values; injected, since words live elsewhere. */
export type Say = (code: string, values: Notice['values']) => string;

/** Collects what the user should know while a record is reduced. */
export interface NoticeList {
  add(severity: Severity, code: string, about: readonly string[], values?: Notice['values']): void;
  readonly notices: readonly Notice[];
}

export function noticeList(say: Say): NoticeList {
  const notices: Notice[] = [];
  return {
    notices,
    add(severity, code, about, values = {}) {
      notices.push({code, severity, about: [...about], values, text: say(code, values)});
    },
  };
}
