/** Words for assistive technology on what just changed, such as the number of results; it is there before they are. */
export function LiveRegion({ children }: { readonly children: string }) {
  return (
    <p role="status" className="sr-only">
      {children}
    </p>
  );
}
