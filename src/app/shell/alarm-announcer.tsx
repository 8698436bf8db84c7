import { raisedNow } from '#src/features/alarms/alarm-socket.ts';
import { useStore } from '#src/hooks/use-store.ts';

/** Says a new alarm to a screen reader, politely: it waits for the sentence being read. */
export function AlarmAnnouncer() {
  const text = useStore(raisedNow);
  return (
    <p aria-live="polite" className="sr-only">
      {text}
    </p>
  );
}
