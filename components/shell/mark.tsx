import { cx } from "../ui/class-names";

/**
 * The agraffe from the front: a stud, three holes in a row, a string through each.
 * Below 24 pixels the holes are squares on whole pixels with nothing inside them.
 */
export function Mark({ size = 32, label, className }: { size?: number; label?: string; className?: string }) {
  const small = size < 24;
  return (
    <svg
      width={size}
      height={size}
      viewBox={small ? "0 0 16 16" : "0 0 32 32"}
      fill="none"
      className={cx("block shrink-0 text-brass", className)}
      focusable="false"
      role={label ? "img" : undefined}
      aria-label={label}
      aria-hidden={label ? undefined : true}
    >
      {small ? (
        <>
          <path stroke="currentColor" d="M3.500 0v4M8 0v4M12.500 0v4M3.500 12v4M8 12v4M12.500 12v4" />
          <path
            fill="currentColor"
            fillRule="evenodd"
            d="M4 3.500h8a4 4 0 0 1 4 4v1a4 4 0 0 1-4 4H4a4 4 0 0 1-4-4v-1a4 4 0 0 1 4-4ZM2.500 7v2h2V7Zm4.500 0v2h2V7Zm4.500 0v2h2V7Z"
          />
        </>
      ) : (
        <>
          <path stroke="currentColor" d="M8 0v11M16 0v11M24 0v11M8 21v11M16 21v11M24 21v11" />
          <path
            fill="currentColor"
            fillRule="evenodd"
            d="M6 10h20c3.300 0 5 2.400 5 6s-1.700 6-5 6H6c-3.300 0-5-2.400-5-6s1.700-6 5-6Zm2 3.250a2.750 2.750 0 1 0 0 5.500 2.750 2.750 0 0 0 0-5.500Zm8 0a2.750 2.750 0 1 0 0 5.500 2.750 2.750 0 0 0 0-5.500Zm8 0a2.750 2.750 0 1 0 0 5.500 2.750 2.750 0 0 0 0-5.500Z"
          />
          <path stroke="currentColor" strokeWidth=".7" d="M8 13v6M16 13v6M24 13v6" />
        </>
      )}
    </svg>
  );
}

export function WordMark({ className }: { className?: string }) {
  return (
    <span className={cx("inline-flex items-center gap-3", className)}>
      <Mark />
      <span className="serif text-28 tracking-[-0.015em]">Agraffe</span>
    </span>
  );
}

/** The mark at the size of a page, its strings running from edge to edge. */
export function GreatMark({ className }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 728 900"
      preserveAspectRatio="xMidYMid slice"
      className={cx("size-full text-brass-fill", className)}
      aria-hidden="true"
      focusable="false"
    >
      <path stroke="currentColor" strokeWidth="2" d="M264-900v2700M364-900v2700M464-900v2700" />
      <path
        fill="currentColor"
        d="M234 378H494c50 0 78 30 78 72s-28 72-78 72H234c-50 0-78-30-78-72s28-72 78-72Z"
      />
      <path
        fill="var(--cover)"
        d="M264 418a32 32 0 1 0 0 64 32 32 0 0 0 0-64Zm100 0a32 32 0 1 0 0 64 32 32 0 0 0 0-64Zm100 0a32 32 0 1 0 0 64 32 32 0 0 0 0-64Z"
      />
      <path stroke="currentColor" strokeWidth="2" d="M264 410v80M364 410v80M464 410v80" />
    </svg>
  );
}
