import { message } from '@/lib/messages';

export default function LinkClosed() {
  return (
    <main id="main" className="mx-auto flex w-full max-w-lg flex-col gap-4 px-5 py-14">
      <h1 className="text-3xl">{message('customer.link-closed')}</h1>
      <p>{message('customer.link-closed.why')}</p>
      <p>
        <strong>{message('customer.link-closed.do')}</strong>
      </p>
    </main>
  );
}
