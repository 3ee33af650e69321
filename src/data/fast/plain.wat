;; Reads the rows of a plain file in memory (see plain.ts for the layout): numbers of up to 15 digits, empty cells, and words, quoted or not, with
;; where they are and their hash. Stops before the first row that holds anything else, which is then read by the loop in scan.ts.
(module
  (memory (export "memory") 16)

  ;; Rows from `at` up to `end`, which is just after a line feed, `most` at the most. Gives how many; leaves the place after them at 448 and
  ;; sets 452 where a number had a decimal mark.
  (func (export "rows")
    (param $at i32) (param $end i32) (param $most i32) (param $width i32) (param $separator i32) (param $mark i32) (result i32)
    (local $row i32) (local $start i32) (local $c i32) (local $byte i32) (local $i i32) (local $cell i32) (local $first i32)
    (local $digits i32) (local $decimals i32) (local $negative i32) (local $pointed i32) (local $marked i32) (local $hash i32)
    (local $out i32) (local $quoted i32) (local $whole i64) (local $value f64)
    (block $done
      (block $odd
        (loop $rows
          (br_if $done (i32.ge_u (local.get $at) (local.get $end)))
          (br_if $done (i32.ge_u (local.get $row) (local.get $most)))
          (local.set $start (local.get $at))
          (local.set $c (i32.const 0))
          (local.set $marked (i32.const 0))
          (loop $cells
            (local.set $cell (local.get $at))
            (local.set $i (local.get $at))
            (local.set $byte (i32.load8_u (local.get $i)))
            (local.set $out (i32.load offset=1024 (i32.shl (local.get $c) (i32.const 2))))
            (if (i32.load8_u offset=512 (local.get $c))
              (then
                (local.set $negative (i32.eq (local.get $byte) (i32.const 45)))
                (if (local.get $negative)
                  (then
                    (local.set $i (i32.add (local.get $i) (i32.const 1)))
                    (local.set $byte (i32.load8_u (local.get $i)))))
                (local.set $first (local.get $i))
                (local.set $whole (i64.const 0))
                (block $whole_end
                  (loop $next
                    (br_if $whole_end (i32.ge_u (i32.sub (local.get $byte) (i32.const 48)) (i32.const 10)))
                    (local.set $whole
                      (i64.add (i64.mul (local.get $whole) (i64.const 10))
                        (i64.extend_i32_u (i32.sub (local.get $byte) (i32.const 48)))))
                    (local.set $i (i32.add (local.get $i) (i32.const 1)))
                    (local.set $byte (i32.load8_u (local.get $i)))
                    (br $next)))
                (local.set $digits (i32.sub (local.get $i) (local.get $first)))
                (local.set $decimals (i32.const 0))
                (local.set $pointed (i32.eq (local.get $byte) (local.get $mark)))
                (if (local.get $pointed)
                  (then
                    (local.set $i (i32.add (local.get $i) (i32.const 1)))
                    (local.set $byte (i32.load8_u (local.get $i)))
                    (local.set $first (local.get $i))
                    (block $decimals_end
                      (loop $next
                        (br_if $decimals_end (i32.ge_u (i32.sub (local.get $byte) (i32.const 48)) (i32.const 10)))
                        (local.set $whole
                          (i64.add (i64.mul (local.get $whole) (i64.const 10))
                            (i64.extend_i32_u (i32.sub (local.get $byte) (i32.const 48)))))
                        (local.set $i (i32.add (local.get $i) (i32.const 1)))
                        (local.set $byte (i32.load8_u (local.get $i)))
                        (br $next)))
                    (local.set $decimals (i32.sub (local.get $i) (local.get $first)))
                    (local.set $digits (i32.add (local.get $digits) (local.get $decimals)))))
                (br_if $odd (i32.ne (i32.load8_u (local.get $byte)) (i32.const 1)))
                (if (local.get $digits)
                  (then
                    ;; an exact integer divided once by an exact power of ten is correctly rounded
                    (br_if $odd (i32.gt_u (local.get $digits) (i32.const 15)))
                    (local.set $value (f64.convert_i64_s (local.get $whole)))
                    (if (local.get $decimals)
                      (then
                        (local.set $value
                          (f64.div (local.get $value) (f64.load offset=256 (i32.shl (local.get $decimals) (i32.const 3)))))))
                    (if (local.get $negative) (then (local.set $value (f64.neg (local.get $value)))))
                    (local.set $marked (i32.or (local.get $marked) (local.get $pointed))))
                  (else
                    (br_if $odd (i32.ne (local.get $i) (local.get $cell)))
                    (local.set $value (f64.const nan))))
                (f64.store (i32.add (local.get $out) (i32.shl (local.get $row) (i32.const 3))) (local.get $value)))
              (else
                (local.set $hash (i32.const 0x811c9dc5))
                ;; in quotes, everything up to the next quote but line ends
                (local.set $quoted (i32.eq (local.get $byte) (i32.const 34)))
                (if (local.get $quoted)
                  (then
                    (local.set $cell (i32.add (local.get $cell) (i32.const 1)))
                    (local.set $i (local.get $cell))
                    (local.set $byte (i32.load8_u (local.get $i)))))
                (block $word_end
                  (loop $next
                    (if (i32.load8_u (local.get $byte))
                      (then
                        (br_if $word_end (i32.eqz (local.get $quoted)))
                        (br_if $word_end (i32.ne (local.get $byte) (local.get $separator)))))
                    (local.set $hash (i32.mul (i32.xor (local.get $hash) (local.get $byte)) (i32.const 0x01000193)))
                    (local.set $i (i32.add (local.get $i) (i32.const 1)))
                    (local.set $byte (i32.load8_u (local.get $i)))
                    (br $next)))
                (br_if $odd (i32.ne (i32.eq (local.get $byte) (i32.const 34)) (local.get $quoted)))
                ;; blanks at either end are trimmed elsewhere: 32 and 9 to 13
                (if (i32.gt_u (local.get $i) (local.get $cell))
                  (then
                    (br_if $odd (call $blank (i32.load8_u (local.get $cell))))
                    (br_if $odd (call $blank (i32.load8_u (i32.sub (local.get $i) (i32.const 1)))))))
                (local.set $out (i32.add (local.get $out) (i32.mul (local.get $row) (i32.const 12))))
                (i32.store (local.get $out) (local.get $cell))
                (i32.store offset=4 (local.get $out) (local.get $i))
                (i32.store offset=8 (local.get $out) (local.get $hash))
                (if (local.get $quoted)
                  (then
                    (local.set $i (i32.add (local.get $i) (i32.const 1)))
                    (local.set $byte (i32.load8_u (local.get $i)))
                    (br_if $odd (i32.ne (i32.load8_u (local.get $byte)) (i32.const 1)))))))
            (local.set $c (i32.add (local.get $c) (i32.const 1)))
            (local.set $at (i32.add (local.get $i) (i32.const 1)))
            (if (i32.eq (local.get $byte) (local.get $separator))
              (then
                (br_if $odd (i32.ge_u (local.get $c) (local.get $width)))
                (br $cells))))
          (if (i32.eq (local.get $byte) (i32.const 13))
            (then
              (br_if $odd (i32.ne (i32.load8_u (local.get $at)) (i32.const 10)))
              (local.set $at (i32.add (local.get $at) (i32.const 1)))))
          (br_if $odd (i32.lt_u (local.get $c) (local.get $width)))
          (if (local.get $marked) (then (i32.store (i32.const 452) (i32.const 1))))
          (local.set $row (i32.add (local.get $row) (i32.const 1)))
          (br $rows)))
      (local.set $at (local.get $start)))
    (i32.store (i32.const 448) (local.get $at))
    (local.get $row))

  (func $blank (param $byte i32) (result i32)
    (i32.or
      (i32.eq (local.get $byte) (i32.const 32))
      (i32.lt_u (i32.sub (local.get $byte) (i32.const 9)) (i32.const 5)))))
