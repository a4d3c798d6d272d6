;; The inner loops of the binary STL writer, for large meshes. Assembled into facets-code.ts with
;;   npx wat2wasm (npm package wabt 1.0.x) src/files/stl/facets.wat -o facets.wasm && base64 -w 100 facets.wasm
;; facets.ts does the same in TypeScript; a test compares the two bit for bit.
(module
  (memory (export "memory") 1)

  ;; Rounds the doubles from $from up to $end to float32 at $to, negative zeros to zeros.
  ;; Answers with 0, or NaN if one of them is not finite as a float32.
  (func (export "round") (param $from i32) (param $end i32) (param $to i32) (result f32)
    (local $value f32) (local $zero f32)
    (loop $next
      (local.set $value (f32.add (f32.demote_f64 (f64.load (local.get $from))) (f32.const 0)))
      (f32.store (local.get $to) (local.get $value))
      (local.set $zero (f32.add (local.get $zero) (f32.sub (local.get $value) (local.get $value))))
      (local.set $to (i32.add (local.get $to) (i32.const 4)))
      (br_if $next (i32.lt_u (local.tee $from (i32.add (local.get $from) (i32.const 8))) (local.get $end))))
    (local.get $zero))

  ;; Writes facets of 50 bytes at $out for the vertex numbers from $tri up to $end; $pos is where the $count float32
  ;; positions begin. Answers with 0, or 1 if a vertex number is not below $count.
  (func (export "facets")
    (param $tri i32) (param $end i32) (param $pos i32) (param $count i32) (param $out i32) (result i32)
    (local $a i32) (local $b i32) (local $c i32)
    (local $ax f64) (local $ay f64) (local $az f64)
    (local $ux f64) (local $uy f64) (local $uz f64)
    (local $vx f64) (local $vy f64) (local $vz f64)
    (local $nx f64) (local $ny f64) (local $nz f64) (local $scale f64)
    (loop $next
      (local.set $a (i32.load (local.get $tri)))
      (local.set $b (i32.load offset=4 (local.get $tri)))
      (local.set $c (i32.load offset=8 (local.get $tri)))
      (if (i32.or (i32.or
            (i32.ge_u (local.get $a) (local.get $count))
            (i32.ge_u (local.get $b) (local.get $count)))
            (i32.ge_u (local.get $c) (local.get $count)))
        (then (return (i32.const 1))))
      (local.set $a (i32.add (local.get $pos) (i32.mul (local.get $a) (i32.const 12))))
      (local.set $b (i32.add (local.get $pos) (i32.mul (local.get $b) (i32.const 12))))
      (local.set $c (i32.add (local.get $pos) (i32.mul (local.get $c) (i32.const 12))))
      (local.set $ax (f64.promote_f32 (f32.load (local.get $a))))
      (local.set $ay (f64.promote_f32 (f32.load offset=4 (local.get $a))))
      (local.set $az (f64.promote_f32 (f32.load offset=8 (local.get $a))))
      (local.set $ux (f64.sub (f64.promote_f32 (f32.load (local.get $b))) (local.get $ax)))
      (local.set $uy (f64.sub (f64.promote_f32 (f32.load offset=4 (local.get $b))) (local.get $ay)))
      (local.set $uz (f64.sub (f64.promote_f32 (f32.load offset=8 (local.get $b))) (local.get $az)))
      (local.set $vx (f64.sub (f64.promote_f32 (f32.load (local.get $c))) (local.get $ax)))
      (local.set $vy (f64.sub (f64.promote_f32 (f32.load offset=4 (local.get $c))) (local.get $ay)))
      (local.set $vz (f64.sub (f64.promote_f32 (f32.load offset=8 (local.get $c))) (local.get $az)))
      (local.set $nx (f64.sub
        (f64.mul (local.get $uy) (local.get $vz)) (f64.mul (local.get $uz) (local.get $vy))))
      (local.set $ny (f64.sub
        (f64.mul (local.get $uz) (local.get $vx)) (f64.mul (local.get $ux) (local.get $vz))))
      (local.set $nz (f64.sub
        (f64.mul (local.get $ux) (local.get $vy)) (f64.mul (local.get $uy) (local.get $vx))))
      (local.set $scale (f64.add
        (f64.add
          (f64.mul (local.get $nx) (local.get $nx)) (f64.mul (local.get $ny) (local.get $ny)))
        (f64.mul (local.get $nz) (local.get $nz))))
      (if (f64.gt (local.get $scale) (f64.const 0))
        (then (local.set $scale (f64.div (f64.const 1) (f64.sqrt (local.get $scale))))))
      (f32.store (local.get $out)
        (f32.add (f32.demote_f64 (f64.mul (local.get $nx) (local.get $scale))) (f32.const 0)))
      (f32.store offset=4 (local.get $out)
        (f32.add (f32.demote_f64 (f64.mul (local.get $ny) (local.get $scale))) (f32.const 0)))
      (f32.store offset=8 (local.get $out)
        (f32.add (f32.demote_f64 (f64.mul (local.get $nz) (local.get $scale))) (f32.const 0)))
      (i64.store offset=12 (local.get $out) (i64.load (local.get $a)))
      (i32.store offset=20 (local.get $out) (i32.load offset=8 (local.get $a)))
      (i64.store offset=24 (local.get $out) (i64.load (local.get $b)))
      (i32.store offset=32 (local.get $out) (i32.load offset=8 (local.get $b)))
      (i64.store offset=36 (local.get $out) (i64.load (local.get $c)))
      (i32.store offset=44 (local.get $out) (i32.load offset=8 (local.get $c)))
      (i32.store16 offset=48 (local.get $out) (i32.const 0))
      (local.set $out (i32.add (local.get $out) (i32.const 50)))
      (br_if $next (i32.lt_u (local.tee $tri (i32.add (local.get $tri) (i32.const 12))) (local.get $end))))
    (i32.const 0)))
