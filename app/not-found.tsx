export default function NotFound() {
  return (
    <main id="main" className="main">
      <h1>There is no such page</h1>
      <p>
        <a className="link" href="/cases">
          To the cases
        </a>
      </p>
    </main>
  );
}
