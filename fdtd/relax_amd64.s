//go:build amd64 && !purego

#include "textflag.h"

// One pole of a block: x = p x + b u; sum += x. p is in a register, b is
// broadcast from memory; Y0 is u, Y1 the sum.
#define POLE(N, P) \
	VMULPD       (N*32)(SI), P, Y2 \
	VBROADCASTSD (N*8)(R9), Y3 \
	VMULPD       Y0, Y3, Y3 \
	VADDPD       Y3, Y2, Y2 \
	VMOVUPD      Y2, (N*32)(SI) \
	VADDPD       Y2, Y1, Y1

// The factors p of all poles, from R8.
#define LOADP \
	VBROADCASTSD 0(R8), Y4 \
	VBROADCASTSD 8(R8), Y5 \
	VBROADCASTSD 16(R8), Y6 \
	VBROADCASTSD 24(R8), Y7 \
	VBROADCASTSD 32(R8), Y8 \
	VBROADCASTSD 40(R8), Y9 \
	VBROADCASTSD 48(R8), Y10 \
	VBROADCASTSD 56(R8), Y11 \
	VBROADCASTSD 64(R8), Y12

// All poles of a block.
#define POLES \
	VXORPD Y1, Y1, Y1 \
	POLE(0, Y4) \
	POLE(1, Y5) \
	POLE(2, Y6) \
	POLE(3, Y7) \
	POLE(4, Y8) \
	POLE(5, Y9) \
	POLE(6, Y10) \
	POLE(7, Y11) \
	POLE(8, Y12)

// func relaxAVX(sum, j, u, p, b *float64, blocks int)
TEXT ·relaxAVX(SB), NOSPLIT, $0-48
	MOVQ         sum+0(FP), DI
	MOVQ         j+8(FP), SI
	MOVQ         u+16(FP), DX
	MOVQ         p+24(FP), R8
	MOVQ         b+32(FP), R9
	MOVQ         blocks+40(FP), CX
	LOADP

loop:
	VMOVUPD (DX), Y0
	POLES
	VMOVUPD Y1, (DI)
	ADDQ    $32, DX
	ADDQ    $32, DI
	ADDQ    $288, SI
	DECQ    CX
	JNZ     loop
	VZEROUPPER
	RET

// func currentsAVX(w, v, sum, j, p, b, factors *float64, blocks int)
TEXT ·currentsAVX(SB), NOSPLIT, $0-64
	MOVQ         w+0(FP), R10
	MOVQ         v+8(FP), R11
	MOVQ         sum+16(FP), DI
	MOVQ         j+24(FP), SI
	MOVQ         p+32(FP), R8
	MOVQ         b+40(FP), R9
	MOVQ         factors+48(FP), DX
	MOVQ         blocks+56(FP), CX
	VBROADCASTSD 0(DX), Y13
	VBROADCASTSD 8(DX), Y14
	LOADP

loop:
	VMOVUPD (R10), Y0         // old w
	VMOVUPD 8(R11), Y1
	VSUBPD  (R11), Y1, Y1     // v[i+1] - v[i]
	VMULPD  Y14, Y1, Y1
	VMULPD  Y13, Y0, Y2
	VSUBPD  Y1, Y2, Y2        // wa w - wb dv
	VADDPD  (DI), Y2, Y2      // new w
	VMOVUPD Y2, (R10)
	VADDPD  Y2, Y0, Y0        // u
	POLES
	VMOVUPD Y1, (DI)
	ADDQ    $32, R10
	ADDQ    $32, R11
	ADDQ    $32, DI
	ADDQ    $288, SI
	DECQ    CX
	JNZ     loop
	VZEROUPPER
	RET
