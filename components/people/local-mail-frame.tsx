/**
 * A mail's own HTML in a frame without scripts, forms or an origin: what a mail says about a page stays
 * inside the frame. A link in it, pressed by a person, leaves for the whole window.
 */
export function LocalMailFrame({ html, title }: { html: string; title: string }) {
  return (
    <iframe
      title={`Mail: ${title}`}
      sandbox="allow-top-navigation-by-user-activation"
      srcDoc={html.replace(/<html[^>]*>|^(?!.*<html)/is, (start) => `${start}<base target="_top">`)}
      className="mt-4 h-[560px] w-full max-w-180 rounded border border-edge bg-[#fbf8f2]"
    />
  );
}
