--top picorv32_axi
-GCOMPRESSED_ISA=1
-GENABLE_MUL=1
-GENABLE_DIV=1
-GENABLE_IRQ=1
-GENABLE_TRACE=1
$SITE/pythondata_cpu_picorv32/verilog/picorv32.v
