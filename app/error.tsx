'use client';

import { Door } from '@/components/ui/door';

/** A fault of ours: nothing of it is shown but a way on. */
export default function ErrorPage({ reset }: { error: Error; reset: () => void }) {
  return (
    <Door title="That went wrong here">
      <p>The server failed at that. What was saved before is safe; what you just sent may not have been.</p>
      <button className="btn btn-main" onClick={reset}>Try again</button>
    </Door>
  );
}
