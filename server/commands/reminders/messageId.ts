import type { AppContext } from '@/server/context';

/** Message-ID of a reminder's mail, made with the reminder so that every try carries the same one. */
export function messageIdFor(app: Pick<AppContext, 'publicUrl'>, reminderId: string): string {
  return `<reminder-${reminderId}@${new URL(app.publicUrl).hostname}>`;
}
