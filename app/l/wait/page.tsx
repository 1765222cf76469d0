import { message } from '@/lib/messages';

export default function WaitPage() {
  return (
    <main id="main" className="mx-auto flex w-full max-w-lg flex-col gap-4 px-5 py-14">
      <h1 className="text-3xl">{message('customer.wait-page')}</h1>
      <p>{message('customer.wait-page.why')}</p>
      <p>
        <strong>{message('customer.wait-page.do')}</strong>
      </p>
    </main>
  );
}
