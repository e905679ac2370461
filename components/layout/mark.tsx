/** A vessel, partly filled. */
export function Mark() {
  return (
    <svg viewBox="0 0 24 28" className="h-7 w-6" aria-hidden="true">
      <path
        d="M9 1h6v4c4 1 6 4 6 7v11a4 4 0 0 1-4 4H7a4 4 0 0 1-4-4V12c0-3 2-6 6-7z"
        fill="none"
        stroke="#fff"
        strokeWidth="1.8"
      />
      <path d="M4 15h16v8a3 3 0 0 1-3 3H7a3 3 0 0 1-3-3z" fill="#F2B705" />
    </svg>
  )
}
