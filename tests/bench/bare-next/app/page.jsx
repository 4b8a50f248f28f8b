export const dynamic = "force-dynamic";

export default function Page() {
  return <h1>The framework&apos;s own bare page</h1>;
}
